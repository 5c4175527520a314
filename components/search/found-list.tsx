import type { SearchHit } from '@/db/queries/search';
import { dayWords } from '@/lib/date-words';

type FoundListProps = { hits: SearchHit[]; zone: string; nowMs: number };

const hrefOf = ({ kind, orderNumber, subjectId, questionId }: SearchHit) =>
  kind === 'entry' ? `/builds/${orderNumber}#entry-${subjectId}` : `/questions/${questionId}`;

/** Entries and letters with the words that were looked for, the newest first. */
export function FoundList({ hits, zone, nowMs }: FoundListProps) {
  return (
    <ol role="list" aria-label="What was found" className="border-t-2 border-ink">
      {hits.map((hit) => (
        <li key={hit.seq} className="relative grid gap-1 border-b border-line py-4 hover:bg-tint">
          <p className="text-sm text-soft">
            <a
              href={hrefOf(hit)}
              className="font-semibold text-finish-deep after:absolute after:inset-0 hover:underline"
            >
              {hit.kind === 'entry' ? 'Entry' : 'Letter'}
              {hit.subject !== null && (
                <>
                  : <bdi>{hit.subject}</bdi>
                </>
              )}
            </a>{' '}
            · <span className="narrow font-semibold">{hit.orderNumber}</span> <bdi>{hit.instrument}</bdi> ·{' '}
            <bdi>{hit.author}</bdi>, {dayWords(hit.at, zone, nowMs)}
          </p>
          <p dir="auto" className="max-w-[72ch] font-read wrap-anywhere">
            {hit.pieces.map(({ text, isHit }, index) =>
              isHit ? (
                <mark key={index} className="rounded-sm bg-brass-wash px-0.5 text-ink">
                  {text}
                </mark>
              ) : (
                text
              ),
            )}
          </p>
        </li>
      ))}
    </ol>
  );
}
