import type { ReactNode } from 'react';
import type { QuotedEntry as Quoted } from '@/db/queries/question-form';
import { dayWords } from '@/lib/date-words';

type QuotedEntryProps = { entry: Quoted; orderNumber: string; zone: string; nowMs: number; action?: ReactNode };

/** The entry of the diary that a question is about, with the way to it. */
export function QuotedEntry({ entry, orderNumber, zone, nowMs, action }: QuotedEntryProps) {
  return (
    <figure className="grid gap-1 border-l-2 border-finish-deep pl-4">
      <figcaption className="flex flex-wrap items-baseline gap-x-5">
        <a
          href={`/builds/${orderNumber}#entry-${entry.id}`}
          className="inline-flex min-h-11 items-center font-semibold text-finish-deep hover:underline md:min-h-8"
        >
          Entry of {dayWords(entry.datedAt, zone, nowMs)}, by {entry.author}
        </a>
        {action}
      </figcaption>
      {entry.excerpt !== '' && (
        <blockquote className="max-w-[62ch] font-read text-soft italic wrap-anywhere">
          <bdi>{entry.excerpt}</bdi>
        </blockquote>
      )}
    </figure>
  );
}
