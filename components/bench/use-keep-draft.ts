'use client';

import { useEffect, useRef } from 'react';
import type { DraftKeeper } from './draft-keeper';
import type { Draft } from './draft-state';

/**
 * Writes the draft down after each change, and at once when the page is put away or the posting goes a step on: a refused
 * entry must not be found as one under way.
 */
export function useKeepDraft(keeper: DraftKeeper, draft: Draft, opened: Draft): void {
  const lastStep = useRef(opened.posting.step);
  useEffect(() => {
    const { step } = draft.posting;
    const movedOn = step !== lastStep.current;
    lastStep.current = step;
    // What is under way has been written down before it left.
    if (draft === opened || step === 'posted' || step === 'sending') return;
    if (movedOn) void keeper.keepNow(draft);
    else keeper.keepSoon(draft);
  }, [keeper, draft, opened]);
  useEffect(() => {
    const flush = () => keeper.flush();
    document.addEventListener('visibilitychange', flush);
    window.addEventListener('pagehide', flush);
    return () => {
      document.removeEventListener('visibilitychange', flush);
      window.removeEventListener('pagehide', flush);
      flush();
    };
  }, [keeper]);
}
