'use client';

import { useEffect, useRef, useState } from 'react';
import { readChoice } from '@/components/bench/read-choice';
import { createUploader, type Uploader } from '@/lib/photos/upload';
import { pause } from '@/lib/photos/upload-delay';
import type { UploadState } from '@/lib/photos/upload-state';
import { shopTransport } from '@/lib/photos/upload-transport';

/** The photo of one line on its way to the shop; `onReady` gets its id when it has arrived whole. A new choice replaces the one under way. */
export function useLinePhoto(orderNumber: string, onReady: (photoId: string) => void) {
  const [upload, setUpload] = useState<UploadState | null>(null);
  const [refusal, setRefusal] = useState<string | null>(null);
  const uploader = useRef<Uploader | null>(null);
  useEffect(() => {
    const wake = () => uploader.current?.wake();
    window.addEventListener('online', wake);
    return () => {
      window.removeEventListener('online', wake);
      uploader.current?.stop();
    };
  }, []);

  async function choose(file: File): Promise<void> {
    const choice = await readChoice(file, crypto.randomUUID());
    setRefusal(choice.ok ? null : choice.sentence);
    if (!choice.ok) return;
    uploader.current?.stop();
    uploader.current = createUploader({
      transport: shopTransport(orderNumber),
      onChange: (_uploadKey, state) => {
        setUpload(state);
        if (state.step === 'ready') onReady(state.photoId);
      },
      pause,
      random: Math.random,
    });
    uploader.current.add(choice.file);
  }
  return { upload, refusal, choose };
}
