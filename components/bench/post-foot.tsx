'use client';

import { useRouter } from 'next/navigation';
import { useEffect, useId, type Dispatch } from 'react';
import type { DraftKeeper } from './draft-keeper';
import { problemOf, type Draft, type DraftEvent } from './draft-state';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { isGoingUp } from '@/lib/photos/upload-state';

type PostFootProps = {
  draft: Draft;
  dispatch: Dispatch<DraftEvent>;
  orderNumber: string;
  keeper: DraftKeeper;
  onTryNow: () => void;
};

/** The way of the entry into the diary: the button, or what has become of it since it was pressed. */
export function PostFoot({ draft, dispatch, orderNumber, keeper, onTryNow }: PostFootProps) {
  const { posting } = draft;
  if (posting.step === 'posted')
    return <Posted orderNumber={orderNumber} keeper={keeper} entryId={posting.entryId} isHeld={posting.isHeld} />;
  if (posting.step === 'writing') return <PostButton draft={draft} dispatch={dispatch} />;
  const isSending = posting.step === 'sending';
  return (
    <div className="grid gap-3">
      <Button size="bench" isWide disabled={isSending} onClick={onTryNow}>
        {isSending ? 'Sending' : 'Try now'}
      </Button>
      {!isSending &&
        (posting.wasSent ? (
          <p className="text-soft">
            It may have reached the shop already, so it stays as it is until there is an answer.
          </p>
        ) : (
          <Button variant="quiet" size="bench" isWide onClick={() => dispatch({ type: 'post-taken-back' })}>
            Change it first
          </Button>
        ))}
    </div>
  );
}

function PostButton({ draft, dispatch }: { draft: Draft; dispatch: Dispatch<DraftEvent> }) {
  const id = useId();
  const upCount = draft.photos.filter(({ upload }) => isGoingUp(upload)).length;
  const message = draft.posting.step === 'writing' ? draft.posting.problem?.message : undefined;
  const post = () => {
    const problem = problemOf(draft);
    dispatch(problem ? { type: 'send-refused', problem } : { type: 'post-asked' });
  };
  return (
    <div className="grid gap-2">
      {message && (
        <Notice tone="late" role="alert">
          {message}
        </Notice>
      )}
      <Button size="bench" isWide disabled={upCount > 0} onClick={post} aria-describedby={`${id}-why`}>
        Post to the diary
      </Button>
      <p id={`${id}-why`} className="text-center text-soft empty:hidden">
        {upCount > 0 && `${upCount === 1 ? 'A photo is' : `${upCount} photos are`} still going up.`}
      </p>
    </div>
  );
}

type PostedProps = { orderNumber: string; keeper: DraftKeeper; entryId: string; isHeld: boolean };

function Posted({ orderNumber, keeper, entryId, isHeld }: PostedProps) {
  const router = useRouter();
  useEffect(() => {
    void keeper.clear().then(() => router.push(`/builds/${orderNumber}#entry-${entryId}`));
  }, [router, keeper, orderNumber, entryId]);
  return (
    <Notice tone="done" role="status" title={isHeld ? 'Posted. It waits for a rep’s release.' : 'Posted'}>
      The diary opens.
    </Notice>
  );
}
