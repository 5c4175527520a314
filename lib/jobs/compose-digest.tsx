import { findShop, listDigestEntries, listDigestPhotos, type MailReader } from '@/db/queries/mail-content';
import { findMailSettings } from '@/db/queries/mail-settings';
import { mailJpegKey } from '@/db/queries/photos';
import { Digest, subject, type DigestProps } from '@/emails/digest';
import { renderMail } from '@/emails/render-mail';
import { env } from '@/lib/env';
import { autoHeaders, unsubscribeHeaders } from '@/lib/mail/headers';
import type { FrozenMail } from '@/lib/mail/kinds';
import { unsubscribeToken } from '@/lib/mail/unsubscribe-token';
import { excerpt } from '@/lib/rich-text/excerpt';
import { localDateWords } from '@/lib/schedule/digest-times';

const ENTRIES_SHOWN_PER_BUILD = 4;
const PHOTOS_SHOWN = 3;

type DigestEntryRow = Awaited<ReturnType<typeof listDigestEntries>>[number];
type Picture = { key: string; contentId: string; alt: string };

/** The digest of these entries as its reader may have it now; null when none is left, or no more mail is wanted. */
export async function composeDigest(
  reader: MailReader,
  entryIds: string[],
): Promise<Omit<FrozenMail, 'to' | 'about'> | null> {
  if ((await findMailSettings(reader)).cadence === 'none') return null;
  const rows = await listDigestEntries(reader, entryIds);
  if (rows.length === 0) return null;
  const open = rows.filter((row) => !row.held);
  const pictures = await choosePictures(reader, open);
  const token = unsubscribeToken(reader.id);
  const unsubscribeUrl = `${env().APP_URL}/unsubscribe/${token}`;
  const props: DigestProps = {
    readerName: reader.name,
    shopName: (await findShop()).name,
    builds: groupByBuild(open).map((entries) => buildSection(reader, entries, pictures)),
    held: rows.some((row) => row.held) ? [{ url: `${env().APP_URL}/builds` }] : [],
    settingsUrl: `${env().APP_URL}/me`,
    unsubscribeUrl,
  };
  return {
    subject: subject(props),
    ...(await renderMail(<Digest {...props} />)),
    headers: { ...autoHeaders(), ...unsubscribeHeaders(`${env().APP_URL}/api/unsubscribe/${token}`) },
    photos: [...pictures.values()].map(({ key, contentId }) => ({ key, contentId })),
  };
}

async function choosePictures(reader: MailReader, open: DigestEntryRow[]): Promise<Map<string, Picture>> {
  const shown = groupByBuild(open).flatMap((entries) => entries.slice(0, ENTRIES_SHOWN_PER_BUILD));
  const found =
    shown.length > 0
      ? await listDigestPhotos(
          reader,
          shown.map(({ id }) => id),
        )
      : [];
  const chosen = new Map<string, Picture>();
  for (const { id } of shown) {
    const photo = found.find(({ entryId }) => entryId === id);
    if (!photo?.outPrefix || chosen.size === PHOTOS_SHOWN) continue;
    chosen.set(id, { key: mailJpegKey(photo.outPrefix), contentId: `photo-${chosen.size + 1}`, alt: photo.alt });
  }
  return chosen;
}

function groupByBuild(rows: DigestEntryRow[]): DigestEntryRow[][] {
  const groups = new Map<string, DigestEntryRow[]>();
  for (const row of rows) groups.set(row.buildId, [...(groups.get(row.buildId) ?? []), row]);
  return [...groups.values()];
}

function buildSection(reader: MailReader, entries: DigestEntryRow[], pictures: Map<string, Picture>) {
  const [newest] = entries;
  const url = `${env().APP_URL}/builds/${newest?.orderNumber ?? ''}`;
  return {
    instrument: newest?.instrument ?? '',
    orderNumber: newest?.orderNumber ?? '',
    url,
    stageWords: newest?.stage ?? '',
    entries: entries.slice(0, ENTRIES_SHOWN_PER_BUILD).map((entry) => {
      const picture = pictures.get(entry.id);
      return {
        dateWords: localDateWords(entry.datedAt, reader.timeZone),
        authorWords: entry.author,
        textExcerpt: excerpt(entry.text, 320),
        url: `${url}#entry-${entry.id}`,
        ...(picture ? { photoCid: picture.contentId, photoAlt: picture.alt || undefined } : {}),
      };
    }),
    moreCount: Math.max(0, entries.length - ENTRIES_SHOWN_PER_BUILD),
  };
}
