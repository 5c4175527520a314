import { clsx } from 'clsx';

/** A still shape that holds the place of what is coming; give it the size of that. */
export function Skeleton({ className }: { className?: string }) {
  return <span aria-hidden="true" className={clsx('block animate-pulse rounded bg-line', className ?? 'h-4 w-full')} />;
}

const widths = ['w-full', 'w-11/12', 'w-4/5', 'w-full', 'w-2/3'];

/** Lines of text to come, with a word for a screen reader. */
export function SkeletonText({ lineCount = 3, label = 'Loading' }: { lineCount?: number; label?: string }) {
  return (
    <div role="status" className="grid gap-3">
      <span className="sr-only">{label}</span>
      {Array.from({ length: lineCount }, (_, line) => (
        <Skeleton key={line} className={clsx('h-4', widths[line % widths.length])} />
      ))}
    </div>
  );
}
