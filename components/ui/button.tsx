import { clsx } from 'clsx';
import Link from 'next/link';
import type { ComponentProps } from 'react';

type Look = {
  variant?: 'primary' | 'quiet' | 'danger';
  /** `bench` is at least 48 px high, for gloves and one thumb. */
  size?: 'normal' | 'bench';
  isWide?: boolean;
};

const variants = {
  primary: 'border-finish-deep bg-finish-deep text-on-finish-deep hover:opacity-90',
  quiet: 'border-finish-deep text-finish-deep hover:bg-tint',
  danger: 'border-late bg-late text-on-late hover:opacity-90',
};

const sizes = { normal: 'min-h-10 px-4 py-1.5', bench: 'min-h-13 px-5 py-3 text-lg' };

function buttonClass({ variant = 'primary', size = 'normal', isWide = false }: Look, className?: string) {
  return clsx(
    'inline-flex items-center justify-center gap-2 rounded-[5px] border-[1.5px] text-center font-semibold no-underline',
    'disabled:opacity-55 aria-disabled:opacity-55',
    variants[variant],
    sizes[size],
    isWide && 'w-full',
    className,
  );
}

export function Button({
  variant,
  size,
  isWide,
  className,
  type = 'button',
  ...button
}: Look & ComponentProps<'button'>) {
  return <button type={type} className={buttonClass({ variant, size, isWide }, className)} {...button} />;
}

/** A link that looks like a button, because it leads somewhere. */
export function LinkButton({ variant, size, isWide, className, ...link }: Look & ComponentProps<typeof Link>) {
  return <Link className={buttonClass({ variant, size, isWide }, className)} {...link} />;
}
