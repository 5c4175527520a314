import { clsx } from 'clsx';

const sizes = { small: 'size-6 text-[0.6875rem]', normal: 'size-8 text-xs', large: 'size-11 text-base' };

/** First letters of the first and last word: `Maren Oyelaran` gives `MO`. Empty for an empty name. */
export function initialsOf(name: string): string {
  const words = name.trim().split(/\s+/).filter(Boolean);
  const ends = words.length > 1 ? [words[0], words.at(-1)] : words;
  return ends.map((word) => Array.from(word ?? '')[0]?.toLocaleUpperCase('en') ?? '').join('');
}

/** Initials on a round; the name itself stands beside it, so this is silent to a screen reader. */
export function Avatar({
  name,
  size = 'normal',
  className,
}: {
  name: string;
  size?: keyof typeof sizes;
  className?: string;
}) {
  return (
    <span
      aria-hidden="true"
      className={clsx(
        'inline-flex shrink-0 items-center justify-center rounded-full bg-tint font-semibold text-finish-deep select-none',
        sizes[size],
        className,
      )}
    >
      {initialsOf(name)}
    </span>
  );
}
