import { clsx } from 'clsx';
import type { ReactNode } from 'react';

/** Nothing here yet, or no longer: a sentence and a next step. */
export function EmptyState({
  title,
  children,
  action,
  className,
}: {
  title: string;
  children?: ReactNode;
  action?: ReactNode;
  className?: string;
}) {
  return (
    <div className={clsx('max-w-xl border-t-2 border-ink py-6', className)}>
      <p className="heading text-xl">{title}</p>
      {children && <div className="mt-2 text-soft">{children}</div>}
      {action && <div className="mt-5">{action}</div>}
    </div>
  );
}
