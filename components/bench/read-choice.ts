import type { UploadFile } from '@/lib/photos/upload-walk';
import { choiceRefusal, HEAD_BYTES, photoTypeOf } from '@/lib/photos/upload-check';

export type Choice = { ok: true; file: UploadFile } | { ok: false; sentence: string };

const UNREADABLE = 'This file could not be read on this phone. Choose it again.';

/**
 * Reads a chosen file whole, so that the phone may move or drop it afterwards, and checks it before anything is sent. A refusal begins
 * with the file's name.
 */
export async function readChoice(file: File, uploadKey: string): Promise<Choice> {
  const refuse = (sentence: string): Choice => ({ ok: false, sentence: `${file.name}: ${sentence}` });
  try {
    const head = new Uint8Array(await file.slice(0, HEAD_BYTES).arrayBuffer());
    const contentType = photoTypeOf(head);
    const refusal = choiceRefusal(head, file.size);
    if (refusal || !contentType) return refuse(refusal ?? UNREADABLE);
    const blob = new Blob([await file.arrayBuffer()], { type: contentType });
    return { ok: true, file: { uploadKey, name: file.name.slice(0, 120), contentType, blob } };
  } catch {
    return refuse(UNREADABLE);
  }
}
