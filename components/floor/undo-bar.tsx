'use client';

import { useEffect, useState } from 'react';
import { sendUndo, type LeftBuild, type MovedBuild } from './send-moves';
import { Button } from '@/components/ui/button';

const UNDO_SECONDS = 10;

export type LastMove = { at: number; moved: MovedBuild[]; left: LeftBuild[] };

function movedWords(moved: MovedBuild[]): string {
  const [first] = moved;
  if (!first) return 'No build was moved.';
  if (moved.length === 1) return `${first.orderNumber} is in ${first.stageName} now.`;
  const stages = [...new Set(moved.map(({ stageName }) => stageName))];
  return `${moved.length} builds are moved: ${stages.join(', ')}.`;
}

type UndoBarProps = { last: LastMove; onClose: () => void; onUndone: (left: LeftBuild[]) => void };

/** Says what was moved and what was left, and takes it back for ten seconds. */
export function UndoBar({ last, onClose, onUndone }: UndoBarProps) {
  const [left, setLeft] = useState(UNDO_SECONDS);
  const [problem, setProblem] = useState('');
  const [isSending, setSending] = useState(false);
  useEffect(() => {
    const timer = setInterval(() => setLeft((seconds) => Math.max(0, seconds - 1)), 1000);
    return () => clearInterval(timer);
  }, []);
  const isOver = left === 0 || last.moved.length === 0;
  useEffect(() => {
    if (isOver && last.left.length === 0 && problem === '') onClose();
  }, [isOver, last, onClose, problem]);
  const undo = async () => {
    setSending(true);
    const answer = await sendUndo(last.moved);
    setSending(false);
    if (answer.ok) onUndone(answer.left);
    else setProblem(answer.refused.message);
  };
  return (
    <div className="fixed inset-x-0 bottom-0 z-40 border-t border-night-line bg-night px-4.5 py-3 text-on-night md:px-10 print:hidden">
      <div className="mx-auto flex max-w-[82rem] flex-wrap items-center gap-x-6 gap-y-2">
        <div role="status" className="grid min-w-0 flex-1 gap-1">
          <p className="font-semibold">{movedWords(last.moved)}</p>
          {last.left.length > 0 && (
            <ul className="max-h-40 overflow-y-auto">
              {last.left.map(({ orderNumber, why }) => (
                <li key={orderNumber}>
                  <span className="narrow font-semibold">{orderNumber}</span> stays: {why}
                </li>
              ))}
            </ul>
          )}
          {problem && <p>{problem}</p>}
        </div>
        {!isOver && (
          <Button disabled={isSending} onClick={undo}>
            Undo{' '}
            <span aria-hidden="true" className="tabular-nums">
              ({left})
            </span>
          </Button>
        )}
        <button type="button" onClick={onClose} className="min-h-11 px-2 font-semibold text-night-accent">
          Close
        </button>
      </div>
    </div>
  );
}
