'use client';

import { useEffect, useId, useRef, type ReactNode } from 'react';

type DialogProps = {
  isOpen: boolean;
  /** Called for Escape as well as for the close button. */
  onClose: () => void;
  title: string;
  description?: string;
  children?: ReactNode;
  /** Buttons, the likely one last. */
  actions?: ReactNode;
};

/** The browser's own modal dialog: it keeps focus inside, closes on Escape and gives focus back to what opened it. */
export function Dialog({ isOpen, onClose, title, description, children, actions }: DialogProps) {
  const ref = useRef<HTMLDialogElement>(null);
  const id = useId();

  useEffect(() => {
    const dialog = ref.current;
    if (!dialog || dialog.open === isOpen) return;
    if (isOpen) dialog.showModal();
    else dialog.close();
  }, [isOpen]);

  return (
    <dialog
      ref={ref}
      onClose={onClose}
      aria-labelledby={`${id}-title`}
      aria-describedby={description ? `${id}-description` : undefined}
      className="m-auto max-h-[90dvh] w-[min(32rem,calc(100vw-2rem))] overflow-y-auto rounded-md border border-line bg-sheet p-5 text-ink backdrop:bg-black/50"
    >
      <div className="flex items-start justify-between gap-4">
        <h2 id={`${id}-title`} className="text-xl">
          {title}
        </h2>
        <button
          type="button"
          onClick={() => ref.current?.close()}
          className="-mt-1.5 -mr-2 min-h-10 px-2 font-semibold text-finish-deep"
        >
          Close
        </button>
      </div>
      {description && (
        <p id={`${id}-description`} className="mt-1 text-soft">
          {description}
        </p>
      )}
      {children && <div className="mt-4">{children}</div>}
      {actions && <div className="mt-5 flex flex-wrap justify-end gap-3">{actions}</div>}
    </dialog>
  );
}
