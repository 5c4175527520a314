import { grantDocument } from '@/db/queries/documents';
import { PDF_TYPE } from '@/lib/documents/limits';
import { writeRoute } from '@/lib/route';
import { presignUpload } from '@/lib/storage';
import { newDocument } from '@/lib/validation/sign-offs';

/** Room for one PDF: where to send it, or how it stands if it has arrived before. */
export const POST = writeRoute(newDocument, 'upload', async ({ viewer, input }) => {
  const { id, state, refusal, objectKey } = await grantDocument(viewer, input, Date.now());
  if (state !== 'granted' || !objectKey) return { id, state, message: refusal };
  const { sizeBytes, sha256 } = input;
  return { id, state, upload: await presignUpload({ key: objectKey, contentType: PDF_TYPE, sizeBytes, sha256 }) };
});
