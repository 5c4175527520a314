import { clsx } from 'clsx';

/**
 * How much is done, from 0 to 1; anything outside is shown as the nearest end.
 * The width is an SVG attribute: a style attribute would break the page's content security policy.
 */
export function ProgressBar({
  share,
  label,
  className,
}: {
  share: number;
  /** Says what is under way, to a screen reader. */
  label: string;
  className?: string;
}) {
  const percent = Math.round(Math.min(1, Math.max(0, share)) * 100);
  return (
    <svg
      role="progressbar"
      aria-label={label}
      aria-valuemin={0}
      aria-valuemax={100}
      aria-valuenow={percent}
      className={clsx('block h-2 w-full rounded-full', className)}
    >
      <rect width="100%" height="100%" className="fill-line" />
      <rect width={`${percent}%`} height="100%" className="fill-finish-deep transition-[width]" />
    </svg>
  );
}
