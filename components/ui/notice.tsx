import { clsx } from 'clsx';
import type { ReactNode } from 'react';

const tones = {
  plain: 'border-edge bg-sheet',
  brass: 'border-brass bg-sheet',
  late: 'border-late bg-late-wash',
  done: 'border-finish-deep bg-tint',
};

type NoticeProps = {
  /** brass waits on the reader, late is wrong or overdue, done went well. */
  tone?: keyof typeof tones;
  title?: string;
  children?: ReactNode;
  action?: ReactNode;
  /** Read out when it appears; `alert` interrupts. Leave out for what stands on the page from the start. */
  role?: 'status' | 'alert';
  className?: string;
};

export function Notice({ tone = 'plain', title, children, action, role, className }: NoticeProps) {
  return (
    <div role={role} className={clsx('grid gap-2 rounded border-l-4 px-4 py-3', tones[tone], className)}>
      {title && <p className="heading text-lg">{title}</p>}
      {children && <div className={clsx(title && tone === 'brass' && 'text-soft')}>{children}</div>}
      {action && <div className="mt-1">{action}</div>}
    </div>
  );
}
