import { useEffect, useState } from 'react';

/** Rows on the first screen, and then in each frame: few enough that no frame is missed. */
const FIRST = 24;
const STEP = 40;

/**
 * How many of `total` rows are drawn by now. All come within a second, a few in each frame, so that the whole list is
 * there for the keyboard, a screen reader and the browser's search. Another `key` begins anew.
 */
export function useGrowing(total: number, key: string): number {
  const [grown, setGrown] = useState({ key, count: FIRST });
  const count = grown.key === key ? grown.count : FIRST;
  useEffect(() => {
    if (count >= total) return;
    const frame = requestAnimationFrame(() => setGrown({ key, count: count + STEP }));
    return () => cancelAnimationFrame(frame);
  }, [count, key, total]);
  return Math.min(count, total);
}
