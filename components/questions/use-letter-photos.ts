'use client';

import { useEffect, useState } from 'react';
import type { DraftPhoto } from './draft';
import { readChoice } from '@/components/bench/read-choice';
import { MAX_PHOTOS_PER_ENTRY } from '@/lib/photos/limits';
import { createUploader } from '@/lib/photos/upload';
import { roomRefusal } from '@/lib/photos/upload-check';
import { pause } from '@/lib/photos/upload-delay';
import type { UploadState } from '@/lib/photos/upload-state';
import { shopTransport } from '@/lib/photos/upload-transport';

export type LetterPhoto = { uploadKey: string; alt: string; upload: UploadState };
export type LetterPhotos = ReturnType<typeof useLetterPhotos>;

const kept = ({ photoId, alt }: DraftPhoto): LetterPhoto => ({
  uploadKey: photoId,
  alt,
  upload: { step: 'ready', photoId },
});

const change = (photos: LetterPhoto[], uploadKey: string, over: Partial<LetterPhoto>) =>
  photos.map((photo) => (photo.uploadKey === uploadKey ? { ...photo, ...over } : photo));

/** The photos that have arrived, in order. */
export const arrived = (photos: LetterPhoto[]): DraftPhoto[] =>
  photos.flatMap(({ alt, upload }) => (upload.step === 'ready' ? [{ photoId: upload.photoId, alt }] : []));

/** A letter's photos: each goes to the shop as it is chosen, and stays with the draft once it is there. */
export function useLetterPhotos(orderNumber: string, first: DraftPhoto[]) {
  const [list, setList] = useState<LetterPhoto[]>(() => first.map(kept));
  const [refusals, setRefusals] = useState<string[]>([]);
  const [isReading, setIsReading] = useState(false);
  const [uploader] = useState(() =>
    createUploader({
      transport: shopTransport(orderNumber),
      onChange: (uploadKey, upload) => setList((photos) => change(photos, uploadKey, { upload })),
      pause,
      random: Math.random,
    }),
  );
  useEffect(() => () => uploader.stop(), [uploader]);

  async function choose(files: File[]): Promise<void> {
    const tooMany = roomRefusal(list.length, files.length);
    const sentences = tooMany ? [tooMany] : [];
    setIsReading(true);
    for (const file of files.slice(0, MAX_PHOTOS_PER_ENTRY - list.length)) {
      const choice = await readChoice(file, crypto.randomUUID());
      if (!choice.ok) {
        sentences.push(choice.sentence);
        continue;
      }
      const { uploadKey } = choice.file;
      setList((photos) => [...photos, { uploadKey, alt: '', upload: { step: 'queued' } }]);
      uploader.add(choice.file);
    }
    setRefusals(sentences);
    setIsReading(false);
  }

  return {
    list,
    refusals,
    isReading,
    choose,
    describe: (uploadKey: string, alt: string) => setList((photos) => change(photos, uploadKey, { alt })),
    tryNow: uploader.tryNow,
    remove(uploadKey: string) {
      setList((photos) => photos.filter((photo) => photo.uploadKey !== uploadKey));
      void uploader.remove(uploadKey);
    },
    /** After they went with a letter. */
    clear: () => setList([]),
  };
}
