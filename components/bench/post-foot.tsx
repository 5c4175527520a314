'use client';

import { useId, type Dispatch } from 'react';
import { problemOf, type Draft, type DraftEvent } from './draft-state';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { isGoingUp } from '@/lib/photos/upload-state';

type PostFootProps = { draft: Draft; dispatch: Dispatch<DraftEvent>; isReading: boolean; onTryNow: () => void };

const labels = { writing: 'Post to the diary', kept: 'Try now', sending: 'Sending', posted: 'Posted' };

/** The way of the entry into the diary. It is one button throughout, so that the keyboard does not lose its place. */
export function PostFoot({ draft, dispatch, isReading, onTryNow }: PostFootProps) {
  const id = useId();
  const { posting } = draft;
  const isWriting = posting.step === 'writing';
  const upCount = draft.photos.filter(({ upload }) => isGoingUp(upload)).length;
  const post = () => {
    const problem = problemOf(draft);
    dispatch(problem ? { type: 'send-refused', problem } : { type: 'post-asked' });
  };
  return (
    <div className="grid gap-2.5">
      {isWriting && posting.problem?.message && (
        <Notice tone="late" role="alert">
          {posting.problem.message}
        </Notice>
      )}
      <Button
        size="bench"
        isWide
        disabled={posting.step === 'sending' || (isWriting && (upCount > 0 || isReading))}
        onClick={isWriting ? post : onTryNow}
        aria-describedby={`${id}-why`}
      >
        {labels[posting.step]}
      </Button>
      <p id={`${id}-why`} className="text-center text-soft empty:hidden">
        {isWriting && upCount === 0 && outsideWords(draft)}
        {isWriting && upCount > 0 && `${upCount === 1 ? 'A photo is' : `${upCount} photos are`} still going up.`}
        {posting.step === 'kept' &&
          posting.wasSent &&
          'It may have reached the shop already, so it stays as it is until there is an answer.'}
      </p>
      {posting.step === 'kept' && !posting.wasSent && (
        <Button variant="quiet" size="bench" isWide onClick={() => dispatch({ type: 'post-taken-back' })}>
          Change it first
        </Button>
      )}
    </div>
  );
}

/** Never in the way of posting: what was measured is what is written down. */
function outsideWords({ readings: { stand } }: Draft): string | null {
  if (!stand || stand.outsideCount === 0) return null;
  const which = stand.outsideCount === 1 ? 'One reading is' : `${stand.outsideCount} readings are`;
  return `${which} out of tolerance. It is posted as measured; say in the note what comes of it.`;
}
