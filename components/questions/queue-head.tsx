import { clsx } from 'clsx';
import Link from 'next/link';
import type { QueueFilter } from '@/db/queries/question-lists';
import { workSpanWords } from '@/lib/questions/due-words';

type QueueHeadProps = {
  filter: QueueFilter;
  counts: Record<QueueFilter, number>;
  /** The middle time to a first answer this week, in minutes of work. */
  medianMin: number | null;
  role: 'builder' | 'rep';
};

const labels: Record<QueueFilter, string> = { all: 'All', mine: 'Mine', late: 'Late' };

/** Which questions are shown, how many wait in each, and how quick the shop has been this week. */
export function QueueHead({ filter, counts, medianMin, role }: QueueHeadProps) {
  const filters: QueueFilter[] = role === 'builder' ? ['all', 'late'] : ['all', 'mine', 'late'];
  return (
    <div className="flex flex-wrap items-end justify-between gap-x-10 gap-y-4">
      <nav aria-label="Which questions">
        <ul className="flex gap-1 rounded-md bg-line p-1">
          {filters.map((name) => (
            <li key={name}>
              <Link
                href={name === 'all' ? '/questions' : `/questions?show=${name}`}
                aria-current={name === filter ? 'page' : undefined}
                className={clsx(
                  'flex min-h-11 items-center gap-1.5 rounded px-4 font-semibold md:min-h-9',
                  name === filter && 'bg-sheet text-ink',
                )}
              >
                {labels[name]}
                <span className={clsx('font-normal', name === 'late' && counts.late > 0 ? 'text-late' : 'text-soft')}>
                  {counts[name]}
                  <span className="sr-only"> waiting</span>
                </span>
              </Link>
            </li>
          ))}
        </ul>
      </nav>
      <p className="text-soft">
        {medianMin === null ? (
          'No first answer yet this week'
        ) : (
          <>
            This week half of the first answers came within{' '}
            <span className="font-semibold text-ink">{workSpanWords(medianMin)}</span> of working time
          </>
        )}
      </p>
    </div>
  );
}
