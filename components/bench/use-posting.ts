'use client';

import { useEffect, useEffectEvent, useReducer, useRef, type Dispatch } from 'react';
import type { DraftKeeper } from './draft-keeper';
import { readyPhotos, type Draft, type DraftEvent } from './draft-state';
import { postEntry, type EntryToPost } from './post-entry';

const RETRY_MS = 15_000;

type Parts = {
  draft: Draft;
  dispatch: Dispatch<DraftEvent>;
  keeper: DraftKeeper;
  entryFrom: (draft: Draft, photos: EntryToPost['photos']) => EntryToPost;
  onPhotosMissing: () => void;
};

/**
 * Posts a draft that is to be posted as soon as its photos are up, and again on `online`, on focus and every 15 s until the diary has
 * answered. That a try has begun is written down before it leaves, so that a crash in between does not lose it.
 * @returns what tries at once
 */
export function usePosting({ draft, dispatch, keeper, entryFrom, onPhotosMissing }: Parts): () => void {
  const isUnderWay = useRef(false);
  const [nudges, nudge] = useReducer((count: number) => count + 1, 0);
  const { step } = draft.posting;
  const isDue = (step === 'kept' || step === 'sending') && readyPhotos(draft) !== null;

  const send = useEffectEvent(async () => {
    const photos = readyPhotos(draft);
    if (isUnderWay.current || draft.posting.step !== 'kept' || !photos) return;
    isUnderWay.current = true;
    dispatch({ type: 'send-began' });
    await keeper.keepNow({ ...draft, posting: { step: 'sending', wasSent: true } });
    const event = await postEntry(entryFrom(draft, photos));
    dispatch(event);
    if (event.type === 'send-refused' && event.problem.fields.photos) onPhotosMissing();
    isUnderWay.current = false;
  });

  useEffect(() => {
    if (isDue) void send();
  }, [isDue, nudges]);

  useEffect(() => {
    if (!isDue) return;
    const timer = setInterval(nudge, RETRY_MS);
    window.addEventListener('online', nudge);
    window.addEventListener('focus', nudge);
    return () => {
      clearInterval(timer);
      window.removeEventListener('online', nudge);
      window.removeEventListener('focus', nudge);
    };
  }, [isDue]);

  return nudge;
}
