import { SectionHeading } from '@/components/ui/section-heading';
import { dayWords } from '@/lib/date-words';
import { excerpt } from '@/lib/rich-text/excerpt';

type Held = { id: string; orderNumber: string; instrument: string; author: string; datedAt: number; text: string };
type HeldEntriesProps = { entries: Held[]; count: number; zone: string; nowMs: number };

/** The entries that wait for a rep's release, each with the way to it. */
export function HeldEntries({ entries, count, zone, nowMs }: HeldEntriesProps) {
  if (count === 0) return null;
  const more = count - entries.length;
  return (
    <section id="held" aria-label="Waiting for your release" className="grid gap-2">
      <SectionHeading note={count === 1 ? '1 entry' : `${count} entries`}>Waiting for your release</SectionHeading>
      <ul role="list">
        {entries.map((entry) => (
          <li key={entry.id} className="relative grid gap-x-4 border-b border-line py-3 md:grid-cols-[12rem_1fr]">
            <p>
              <a
                href={`/builds/${entry.orderNumber}#entry-${entry.id}`}
                className="font-semibold text-finish-deep after:absolute after:inset-0 hover:underline"
              >
                <span className="narrow">{entry.orderNumber}</span> <bdi>{entry.instrument}</bdi>
              </a>
            </p>
            <p className="min-w-0 text-soft">
              <bdi>{entry.author}</bdi>, {dayWords(entry.datedAt, zone, nowMs)}
              {entry.text !== '' && (
                <>
                  : <bdi className="font-read italic wrap-anywhere">{excerpt(entry.text, 110)}</bdi>
                </>
              )}
            </p>
          </li>
        ))}
      </ul>
      {more > 0 && <p className="text-sm text-soft">And {more} more on your builds.</p>}
    </section>
  );
}
