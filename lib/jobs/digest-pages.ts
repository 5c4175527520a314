import type { listDigestEntries, MailReader } from '@/db/queries/mail-content';
import type { DigestBuild } from '@/emails/digest-build';
import { env } from '@/lib/env';
import { mailedReading } from '@/lib/readings/mailed-reading';
import type { ReadingValue, ShownReading } from '@/lib/readings/reading';
import { excerpt } from '@/lib/rich-text/excerpt';
import { localDateWords, soundZone } from '@/lib/schedule/digest-times';

const ENTRIES_SHOWN_PER_BUILD = 4;
const BUILDS_SHOWN = 12;
const READINGS_SHOWN_PER_ENTRY = 4;

export type DigestEntryRow = Awaited<ReturnType<typeof listDigestEntries>>[number];
export type Picture = { key: string; contentId: string; alt: string };

function groupByBuild(rows: DigestEntryRow[]): DigestEntryRow[][] {
  const groups = new Map<string, DigestEntryRow[]>();
  for (const row of rows) groups.set(row.buildId, [...(groups.get(row.buildId) ?? []), row]);
  return [...groups.values()];
}

const shownOf = (entries: DigestEntryRow[]) => entries.slice(0, ENTRIES_SHOWN_PER_BUILD);

/** The entries that a mail about these shows, in its order. */
export const shownEntries = (open: DigestEntryRow[]) => groupByBuild(open).slice(0, BUILDS_SHOWN).flatMap(shownOf);

/** The new pages of each build, those of the newest first; what is not shown is counted. */
export function digestBuilds(
  reader: MailReader,
  open: DigestEntryRow[],
  pictures: Map<string, Picture>,
): DigestBuild[] {
  return groupByBuild(open).map((entries, index) => {
    const shown = index < BUILDS_SHOWN ? shownOf(entries) : [];
    return buildSection(reader, entries, shown, pictures);
  });
}

type TakenReading = { value: ReadingValue; shown: ShownReading | null };

/** What was measured, in the units of who reads it. */
function readingLines({ readings }: DigestEntryRow, { units }: MailReader): string[] {
  const taken: TakenReading[] = JSON.parse(readings);
  const lines = taken.flatMap(({ value, shown }) => (shown ? [mailedReading(value, shown, units)] : []));
  const more = lines.length - READINGS_SHOWN_PER_ENTRY;
  return more > 0 ? [...lines.slice(0, READINGS_SHOWN_PER_ENTRY), `and ${more} more in the diary`] : lines;
}

function buildSection(
  reader: MailReader,
  entries: DigestEntryRow[],
  shown: DigestEntryRow[],
  pictures: Map<string, Picture>,
): DigestBuild {
  const [newest] = entries;
  const url = `${env().APP_URL}/builds/${newest?.orderNumber ?? ''}`;
  return {
    instrument: newest?.instrument ?? '',
    orderNumber: newest?.orderNumber ?? '',
    url,
    stageWords: newest?.stage ?? '',
    entries: shown.map((entry) => {
      const picture = pictures.get(entry.id);
      return {
        dateWords: localDateWords(entry.datedAt, soundZone(reader.timeZone), reader.locale),
        authorWords: entry.author,
        textExcerpt: excerpt(entry.text, 320),
        readings: readingLines(entry, reader),
        url: `${url}#entry-${entry.id}`,
        ...(picture ? { photoCid: picture.contentId, photoAlt: picture.alt || undefined } : {}),
      };
    }),
    moreCount: entries.length - shown.length,
  };
}
