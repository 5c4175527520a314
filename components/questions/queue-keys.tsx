'use client';

import { useRef, type KeyboardEvent, type ReactNode } from 'react';

const steps: Record<string, number> = { j: 1, ArrowDown: 1, k: -1, ArrowUp: -1 };

/**
 * Moves between the links of a list by j and k or the arrow keys; Enter opens as ever. Only while the list has the focus,
 * so that no other key press on the page is taken (WCAG 2.1.4).
 */
export function QueueKeys({ children }: { children: ReactNode }) {
  const region = useRef<HTMLDivElement>(null);

  function move(event: KeyboardEvent) {
    const step = steps[event.key];
    if (step === undefined || event.ctrlKey || event.metaKey || event.altKey) return;
    const links = [...(region.current?.querySelectorAll<HTMLElement>('[data-question-link]') ?? [])].filter(
      (link) => link.offsetParent !== null,
    );
    const now = links.findIndex((link) => link === document.activeElement);
    const next = links[now < 0 ? 0 : Math.min(links.length - 1, Math.max(0, now + step))];
    if (!next) return;
    event.preventDefault();
    next.focus();
  }

  return (
    <div ref={region} onKeyDown={move} className="grid gap-3">
      <p className="hidden text-sm text-soft md:block">
        With the list in focus, <Key>j</Key> and <Key>k</Key> or the arrow keys move, <Key>Enter</Key> opens.
      </p>
      {children}
    </div>
  );
}

const Key = ({ children }: { children: string }) => (
  <kbd className="rounded-sm border border-edge px-1.5 font-sans text-xs font-semibold text-ink">{children}</kbd>
);
