import { digestBuilds, shownEntries, type DigestEntryRow, type Picture } from './digest-pages';
import { mailWriters } from './mail-writers';
import { listDigestEntries, listDigestPhotos, type MailReader } from '@/db/queries/mail-content';
import { findShop } from '@/db/queries/shop';
import { listNews } from '@/db/queries/news';
import { mailJpegKey } from '@/db/queries/photos';
import { listLatestWindows } from '@/db/queries/ready-windows';
import { Digest, subject, type DigestNews, type DigestProps } from '@/emails/digest';
import { renderMail } from '@/emails/render-mail';
import { env } from '@/lib/env';
import { readyWords } from '@/lib/floor/said-window';
import { listHeaders, unsubscribeHeaders } from '@/lib/mail/headers';
import type { FrozenMail, MailAbout } from '@/lib/mail/kinds';
import { hostOf } from '@/lib/mail/question-headers';
import { unsubscribeToken } from '@/lib/mail/unsubscribe-token';
import { dayOf } from '@/lib/schedule/calendar';
import { isZone, soundZone } from '@/lib/schedule/digest-times';

const PHOTOS_SHOWN = 3;

/** What a digest says, and the photos it carries inside itself. */
export type DigestContent = { props: DigestProps; pictures: Picture[] };

/** The digest of these entries and news as its reader may have it now; null when none is left, or no mail is wanted. */
export async function composeDigest(
  reader: MailReader,
  about: MailAbout,
  nowMs: number,
): Promise<Omit<FrozenMail, 'to' | 'about'> | null> {
  if (reader.cadence === 'none') return null;
  const content = await gatherDigest(reader, about, nowMs);
  if (!content) return null;
  const { props, pictures } = content;
  const api = `${env().APP_URL}/api/unsubscribe/${unsubscribeToken(reader.id)}`;
  return {
    subject: subject(props),
    ...(await renderMail(<Digest {...props} />)),
    headers: { ...unsubscribeHeaders(api), ...listHeaders(hostOf(env().MAIL_FROM)) },
    photos: pictures.map(({ key, contentId }) => ({ key, contentId })),
  };
}

/** Everything a digest is made of, as its reader may read it now; null when nothing is left to tell. */
export async function gatherDigest(reader: MailReader, about: MailAbout, nowMs: number): Promise<DigestContent | null> {
  const entryIds = about.entryIds ?? [];
  const rows = entryIds.length > 0 ? await listDigestEntries(reader, entryIds) : [];
  const news = await gatherNews(reader, about.newsIds ?? [], nowMs);
  if (rows.length === 0 && news.length === 0) return null;
  const open = rows.filter((row) => !row.held);
  const pictures = await choosePictures(reader, open);
  const props: DigestProps = {
    readerName: reader.name,
    shopName: (await findShop()).name,
    news,
    builds: await withWindows(reader, digestBuilds(reader, open, pictures), open, nowMs),
    held: rows.some((row) => row.held) ? [{ url: `${env().APP_URL}/builds` }] : [],
    ...(isZone(reader.timeZone) ? {} : { lostZone: reader.timeZone }),
    settingsUrl: `${env().APP_URL}/me`,
    unsubscribeUrl: `${env().APP_URL}/unsubscribe/${unsubscribeToken(reader.id)}`,
  };
  return { props, pictures: [...pictures.values()] };
}

/** When each build will be ready, beside the stage it is in. */
async function withWindows(
  reader: MailReader,
  told: DigestProps['builds'],
  open: DigestEntryRow[],
  nowMs: number,
): Promise<DigestProps['builds']> {
  if (told.length === 0) return told;
  const windows = await listLatestWindows(reader, [...new Set(open.map(({ buildId }) => buildId))]);
  const today = dayOf(nowMs, soundZone((await findShop()).timeZone));
  return told.map((build) => {
    const window = windows.find(({ orderNumber }) => orderNumber === build.orderNumber);
    return { ...build, readyWords: (window && readyWords(window, today, reader.locale)) ?? undefined };
  });
}

/** Each piece of news in the words its own mail would have as its subject. */
async function gatherNews(reader: MailReader, newsIds: string[], nowMs: number): Promise<DigestNews[]> {
  const items = newsIds.length > 0 ? await listNews(reader.id, newsIds) : [];
  const news: DigestNews[] = [];
  for (const { kind, about } of items) {
    const told = kind === 'digest' ? null : await mailWriters[kind](about, reader, nowMs);
    if (told && !news.some(({ words, url }) => words === told.subject && url === told.url))
      news.push({ words: told.subject, url: told.url });
  }
  return news;
}

async function choosePictures(reader: MailReader, open: DigestEntryRow[]): Promise<Map<string, Picture>> {
  const ids = shownEntries(open).map(({ id }) => id);
  const found = ids.length > 0 ? await listDigestPhotos(reader, ids) : [];
  const chosen = new Map<string, Picture>();
  for (const id of ids) {
    const photo = found.find(({ entryId }) => entryId === id);
    if (!photo?.outPrefix || chosen.size === PHOTOS_SHOWN) continue;
    chosen.set(id, { key: mailJpegKey(photo.outPrefix), contentId: `photo-${chosen.size + 1}`, alt: photo.alt });
  }
  return chosen;
}
