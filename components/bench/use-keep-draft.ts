'use client';

import { useEffect } from 'react';
import type { DraftKeeper } from './draft-keeper';
import type { Draft } from './draft-state';

/** Writes the draft down after each change, and at once when the page is put away. */
export function useKeepDraft(keeper: DraftKeeper, draft: Draft, opened: Draft): void {
  useEffect(() => {
    if (draft !== opened && draft.posting.step !== 'posted') keeper.keepSoon(draft);
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
