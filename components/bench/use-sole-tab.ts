'use client';

import { useCallback, useEffect, useState } from 'react';

export type TabState = 'asking' | 'ours' | 'elsewhere';

const PATIENCE_MS = 500;

/**
 * One tab at a time writes a draft: two would each keep their own words over the other's. The lock goes back by itself when a tab is
 * closed or dies, and the tab it was taken from stands in line again. Browsers without locks have every tab to themselves; the diary takes an entry once in any case.
 */
export function useSoleTab(name: string): { tab: TabState; takeOver: () => void } {
  const [tab, setTab] = useState<TabState>('asking');
  const [steals, setSteals] = useState(0);
  useEffect(() => {
    const leaving = new AbortController();
    void holdTab(name, steals > 0, leaving.signal, setTab);
    return () => leaving.abort();
  }, [name, steals]);
  const takeOver = useCallback(() => setSteals((count) => count + 1), []);
  return { tab, takeOver };
}

async function holdTab(name: string, steals: boolean, leaving: AbortSignal, tell: (tab: TabState) => void) {
  if (!('locks' in navigator)) return tell('ours');
  const inLine = { signal: leaving };
  const hold = async () => {
    clearTimeout(patience);
    if (leaving.aborted) return;
    tell('ours');
    await new Promise((resolve) => leaving.addEventListener('abort', resolve, { once: true }));
  };
  const patience = setTimeout(() => tell('elsewhere'), PATIENCE_MS);
  for (let isFirst = true; !leaving.aborted; isFirst = false) {
    try {
      await navigator.locks.request(name, isFirst && steals ? { steal: true } : inLine, hold);
    } catch {
      if (!leaving.aborted) tell('elsewhere');
    }
  }
  clearTimeout(patience);
}
