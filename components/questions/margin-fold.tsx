'use client';

import { clsx } from 'clsx';
import { useId, useState, type ReactNode } from 'react';

/** The margin's heading; on a phone it also opens what stands below it. */
export function MarginFold({ count, children }: { count: number; children: ReactNode }) {
  const [isOpen, setIsOpen] = useState(false);
  const id = useId();
  const notes = count === 0 ? 'nothing yet' : count === 1 ? '1 note' : `${count} notes`;
  return (
    <>
      <h2 className="text-base max-lg:hidden">Shop margin</h2>
      <h2 className="text-base lg:hidden">
        <button
          type="button"
          aria-expanded={isOpen}
          aria-controls={id}
          onClick={() => setIsOpen(!isOpen)}
          className="flex min-h-12 w-full items-center justify-between text-left font-semibold"
        >
          <span>
            Shop margin <span className="font-normal text-soft">· {notes}</span>
          </span>
          <span aria-hidden="true" className="text-finish-deep">
            {isOpen ? 'Close' : 'Open'}
          </span>
        </button>
      </h2>
      <div id={id} className={clsx(!isOpen && 'max-lg:hidden')}>
        {children}
      </div>
    </>
  );
}
