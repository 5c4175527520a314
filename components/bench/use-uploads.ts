'use client';

import { useEffect, useState, type Dispatch } from 'react';
import type { DraftEvent } from './draft-state';
import { createUploader, type Uploader } from '@/lib/photos/upload';
import { pause } from '@/lib/photos/upload-delay';
import { shopTransport } from '@/lib/photos/upload-transport';
import type { UploadFile } from '@/lib/photos/upload-walk';

/**
 * Carries a draft's photos to the shop while its page is open. `first` are those the draft was opened with; later ones are added by hand.
 * Leaving the page only stops the transfers: what is kept goes on when the draft is opened again.
 */
export function useUploads(orderNumber: string, first: UploadFile[], dispatch: Dispatch<DraftEvent>): Uploader {
  const [uploader] = useState(() =>
    createUploader({
      transport: shopTransport(orderNumber),
      onChange: (uploadKey, upload) => dispatch({ type: 'photo-moved', uploadKey, upload }),
      pause,
      random: Math.random,
    }),
  );
  useEffect(() => {
    for (const file of first) uploader.add(file);
    const wake = () => uploader.wake();
    window.addEventListener('online', wake);
    window.addEventListener('focus', wake);
    return () => {
      window.removeEventListener('online', wake);
      window.removeEventListener('focus', wake);
      uploader.stop();
    };
  }, [uploader, first]);
  return uploader;
}
