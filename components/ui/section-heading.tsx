import { clsx } from 'clsx';
import type { ReactNode } from 'react';

/** A heading under a 2 px rule; `note` is the quieter line beside it, `action` stands at the far end. */
export function SectionHeading({
  children,
  level = 2,
  note,
  action,
  id,
  className,
}: {
  children: ReactNode;
  level?: 2 | 3;
  note?: ReactNode;
  action?: ReactNode;
  id?: string;
  className?: string;
}) {
  const Heading = level === 2 ? 'h2' : 'h3';
  return (
    <div className={clsx('flex flex-wrap items-baseline gap-x-3 gap-y-1 border-t-2 border-ink pt-3', className)}>
      <Heading id={id} className={level === 2 ? 'text-xl' : 'text-lg'}>
        {children}
      </Heading>
      {note && <p className="text-sm text-soft">{note}</p>}
      {action && <div className="ml-auto">{action}</div>}
    </div>
  );
}
