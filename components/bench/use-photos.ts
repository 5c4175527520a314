'use client';

import { useState, type Dispatch } from 'react';
import type { DraftKeeper } from './draft-keeper';
import type { BenchPhoto, Draft, DraftEvent } from './draft-state';
import { readChoice } from './read-choice';
import { useUploads } from './use-uploads';
import { MAX_PHOTOS_PER_ENTRY } from '@/lib/photos/limits';
import { roomRefusal } from '@/lib/photos/upload-check';

type Parts = {
  orderNumber: string;
  first: BenchPhoto[];
  draft: Draft;
  dispatch: Dispatch<DraftEvent>;
  keeper: DraftKeeper;
};

export type BenchPhotos = ReturnType<typeof usePhotos>;

/** A draft's photos: chosen, kept on the phone, carried to the shop, taken out again. */
export function usePhotos({ orderNumber, first, draft, dispatch, keeper }: Parts) {
  const uploader = useUploads(orderNumber, first, dispatch);
  const [refusals, setRefusals] = useState<string[]>([]);
  const [isReading, setIsReading] = useState(false);
  const count = draft.photos.length;

  async function choose(chosen: File[]): Promise<void> {
    const tooMany = roomRefusal(count, chosen.length);
    const sentences = tooMany ? [tooMany] : [];
    setIsReading(true);
    for (const file of chosen.slice(0, MAX_PHOTOS_PER_ENTRY - count)) {
      const choice = await readChoice(file, crypto.randomUUID());
      if (!choice.ok) sentences.push(choice.sentence);
      if (!choice.ok) continue;
      await keeper.keepPhoto(choice.file);
      dispatch({ type: 'photos-chosen', files: [choice.file] });
      uploader.add(choice.file);
    }
    setRefusals(sentences);
    setIsReading(false);
  }

  function remove(uploadKey: string): void {
    dispatch({ type: 'photo-removed', uploadKey });
    void keeper.dropPhoto(uploadKey);
    void uploader.remove(uploadKey);
  }

  async function discardAll(): Promise<void> {
    for (const { uploadKey } of draft.photos) void uploader.remove(uploadKey);
    await keeper.clear();
  }

  /** The diary misses a photo that was there before, as after a day: each is looked for, and sent again if it is gone. */
  function recheck(): void {
    uploader.stop();
    for (const photo of draft.photos) uploader.add(photo);
  }

  const { tryNow, wake } = uploader;
  return { list: draft.photos, isReading, refusals, choose, remove, discardAll, recheck, tryNow, wake };
}
