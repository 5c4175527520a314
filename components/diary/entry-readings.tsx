import { ShownReading } from '@/components/readings/shown-reading';
import type { DiaryEntry } from '@/db/queries/diary';

/** Kinds that are drawn over time on their own page. */
const overTime = new Set(['wood_room', 'coat', 'colour']);

type EntryReadingsProps = { entry: Pick<DiaryEntry, 'readings' | 'shows'>; orderNumber: string };

/** What was measured, and which items of the spec the entry shows. */
export function EntryReadings({ entry, orderNumber }: EntryReadingsProps) {
  const readings = entry.readings.filter((reading) => reading !== null);
  const isSaid = (item: string) => readings.some(({ label }) => label === item || label.startsWith(`${item}, `));
  const shows = entry.shows.filter((item) => !isSaid(item));
  return (
    <>
      {readings.length > 0 && (
        <dl className="grid gap-x-8 gap-y-4 sm:grid-cols-[repeat(auto-fill,minmax(17rem,1fr))]">
          {readings.map((reading, index) => (
            <ShownReading key={`${reading.label}/${index}`} reading={reading} />
          ))}
        </dl>
      )}
      {readings.some(({ kind }) => overTime.has(kind)) && (
        <p>
          <a
            href={`/builds/${orderNumber}/readings`}
            className="inline-flex min-h-11 items-center text-finish-deep underline underline-offset-4"
          >
            The readings over time
          </a>
        </p>
      )}
      {shows.length > 0 && (
        <p>
          <span className="text-soft">Shows: </span>
          {shows.join(', ')}
        </p>
      )}
    </>
  );
}
