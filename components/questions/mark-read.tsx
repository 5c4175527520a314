'use client';

import { useEffect } from 'react';

/** Tells the shop that this page is open and seen; once for each letter that comes. A page in the background is not seen. */
export function MarkRead({ questionId, lastLetterAt }: { questionId: string; lastLetterAt: number }) {
  useEffect(() => {
    let isTold = false;
    const tell = () => {
      if (isTold || document.visibilityState !== 'visible') return;
      isTold = true;
      const headers = { 'Content-Type': 'application/json' };
      // Whether it arrives matters to nobody's work: the next look tells it again.
      fetch(`/api/questions/${questionId}/read`, { method: 'POST', headers, body: '{}' }).catch(() => undefined);
    };
    tell();
    document.addEventListener('visibilitychange', tell);
    return () => document.removeEventListener('visibilitychange', tell);
  }, [questionId, lastLetterAt]);
  return null;
}
