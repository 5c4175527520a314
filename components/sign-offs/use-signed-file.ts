'use client';

import { useEffect, useRef, useState } from 'react';
import { fileRefusal, isPdf } from '@/lib/documents/choice';
import { uploadDocument, type DocumentUpload } from '@/lib/documents/upload-document';
import { documentDoors } from '@/lib/documents/upload-doors';
import { createUploader } from '@/lib/photos/upload';
import { HEAD_BYTES, photoTypeOf } from '@/lib/photos/upload-check';
import { pause } from '@/lib/photos/upload-delay';
import type { UploadState } from '@/lib/photos/upload-state';
import { shopTransport } from '@/lib/photos/upload-transport';

/** How a PDF or a photo stands on its way to the shop. */
export type FileUpload =
  | Exclude<DocumentUpload, { step: 'ready' }>
  | { step: 'ready'; documentId: string }
  | { step: 'ready'; photoId: string };

/** The one file that is to be signed, and how far it has come. */
export type SignedFile = { name: string; upload: FileUpload };

/** A photo waiting for its turn is being got ready. */
const ofPhoto = (upload: UploadState): FileUpload =>
  upload.step === 'queued' || upload.step === 'asking' ? { step: 'measuring' } : upload;

type Carry = (report: (upload: FileUpload) => void, signal: AbortSignal) => void;

function carryOf(orderNumber: string, file: File, head: Uint8Array): Carry {
  const uploadKey = crypto.randomUUID();
  const contentType = photoTypeOf(head);
  if (isPdf(head) || !contentType)
    return (report, signal) =>
      void uploadDocument({ orderNumber, uploadKey, name: file.name, blob: file }, documentDoors, report, signal);
  return (report, signal) => {
    const onChange = (_: string, upload: UploadState) => report(ofPhoto(upload));
    const uploader = createUploader({ transport: shopTransport(orderNumber), onChange, pause, random: Math.random });
    signal.addEventListener('abort', () => uploader.stop(), { once: true });
    uploader.add({ uploadKey, name: file.name, contentType, blob: file });
  };
}

/** Carries the file somebody chooses to the shop while the form is filled in; choosing another gives the first one up. */
export function useSignedFile(orderNumber: string) {
  const [file, setFile] = useState<SignedFile | null>(null);
  const under = useRef<{ leaving: AbortController; carry: Carry; name: string } | null>(null);
  useEffect(() => () => under.current?.leaving.abort(), []);

  function begin(name: string, carry: Carry): void {
    under.current?.leaving.abort();
    const leaving = new AbortController();
    under.current = { leaving, carry, name };
    carry((upload) => void (leaving.signal.aborted || setFile({ name, upload })), leaving.signal);
  }

  async function choose(chosen: File): Promise<void> {
    const head = new Uint8Array(await chosen.slice(0, HEAD_BYTES).arrayBuffer());
    const refusal = fileRefusal(head, chosen.size);
    if (!refusal) return begin(chosen.name, carryOf(orderNumber, chosen, head));
    under.current?.leaving.abort();
    setFile({ name: chosen.name, upload: { step: 'refused', message: refusal } });
  }

  const tryAgain = () => under.current && begin(under.current.name, under.current.carry);
  return { file, choose, tryAgain };
}
