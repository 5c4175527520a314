'use client';

import { useEffect, useRef, useState, type ReactNode } from 'react';

type FoldRowProps = {
  label: string;
  /** Where it stands, beside the label. */
  said: string;
  isOpenAtFirst?: boolean;
  /** Something in it needs another look: it unfolds, and may be folded again. */
  isCalled?: boolean;
  onOpen?: () => void;
  children: ReactNode;
};

/** A part of the form that stays folded until it is wanted. */
export function FoldRow({ label, said, isOpenAtFirst = false, isCalled = false, onOpen, children }: FoldRowProps) {
  const row = useRef<HTMLDetailsElement>(null);
  const [wasOpen] = useState(isOpenAtFirst);
  useEffect(() => {
    if (isCalled && row.current) row.current.open = true;
  }, [isCalled]);
  return (
    <details
      ref={row}
      open={wasOpen}
      onToggle={({ currentTarget }) => currentTarget.open && onOpen?.()}
      className="group border-b border-line"
    >
      <summary className="flex min-h-13 items-center gap-4">
        <span className="text-lg">{label}</span>
        <span className="min-w-0 flex-1 text-right text-lg font-semibold">{said}</span>
        <span aria-hidden="true" className="text-soft transition-transform group-open:rotate-90">
          ›
        </span>
      </summary>
      <div className="grid gap-4 pt-2 pb-5">{children}</div>
    </details>
  );
}
