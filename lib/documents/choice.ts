import { MAX_PDF_BYTES } from './limits';
import { PDF_REFUSALS } from './refusals';
import { choiceRefusal } from '@/lib/photos/upload-check';

const NEITHER = 'This is neither a PDF nor a photo we can show. Choose a PDF, JPEG, PNG or WebP.';

/** Whether the first bytes of a file are those of a PDF; its name and the type a browser gives it are not asked. */
export const isPdf = (head: Uint8Array) => String.fromCharCode(...head.subarray(0, 5)) === '%PDF-';

/** Why a chosen file is not even sent, as a sentence; null when it may go up. */
export function fileRefusal(head: Uint8Array, sizeBytes: number): string | null {
  if (sizeBytes === 0) return PDF_REFUSALS.empty;
  if (isPdf(head)) return sizeBytes > MAX_PDF_BYTES ? PDF_REFUSALS.too_large : null;
  return choiceRefusal(head, sizeBytes, NEITHER);
}
