'use client';

import { useEffect, useRef, useState } from 'react';
import { createLineSaver, type Saving } from './line-saver';
import type { CheckRunLine } from '@/db/queries/checks';
import { callShop } from '@/lib/photos/upload-answer';
import { pause } from '@/lib/photos/upload-delay';
import type { CheckMark, MarkedLine } from '@/lib/validation/checks';

export type LineMark = { mark: CheckMark | null; note: string; photoId: string | null };

/** One line of an inspection on this phone: what is chosen shows at once and is carried to the shop by itself. */
export function useRunLine(
  line: CheckRunLine,
  url: string,
  onMark: (lineId: string, mark: LineMark, saving: Saving) => void,
) {
  const [mark, setMark] = useState<LineMark>({ mark: line.mark, note: line.note ?? '', photoId: line.photoId });
  // A photo arrives long after it was chosen: it joins what is marked then.
  const latest = useRef(mark);
  const [saving, setSaving] = useState<Saving>({ step: line.mark ? 'saved' : 'fresh' });
  const [saver] = useState(() =>
    createLineSaver({
      send: (body: MarkedLine) => callShop<object>({ method: 'POST', url, body }),
      onChange: setSaving,
      pause,
      random: Math.random,
    }),
  );
  useEffect(() => {
    const wake = () => saver.wake();
    window.addEventListener('online', wake);
    window.addEventListener('focus', wake);
    return () => {
      window.removeEventListener('online', wake);
      window.removeEventListener('focus', wake);
    };
  }, [saver]);
  useEffect(() => onMark(line.id, mark, saving), [line.id, mark, saving, onMark]);

  function change(part: Partial<LineMark>): void {
    const next = { ...latest.current, ...part };
    latest.current = next;
    setMark(next);
    if (next.mark !== null) saver.save({ ...next, mark: next.mark, lineId: line.id });
  }
  return { mark, saving, change };
}
