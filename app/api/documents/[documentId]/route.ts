import { z } from 'zod';
import { discardDocument, requireDocumentFile, requireOwnDocument } from '@/db/queries/documents';
import { pdfFileName } from '@/lib/documents/file-name';
import { checkDocument } from '@/lib/jobs/document-check';
import { readRoute, writeRoute } from '@/lib/route';
import { presignDocument } from '@/lib/storage';

/** A checked PDF, for whoever may see it now: a link into the store that dies within five minutes. */
export const GET = readRoute(async ({ viewer, params }) => {
  const { key, title, orderNumber } = await requireDocumentFile(viewer, params.documentId ?? '');
  const url = await presignDocument(key, pdfFileName(orderNumber, title), Date.now());
  const headers = { Location: url, 'Cache-Control': 'private, no-store', 'X-Content-Type-Options': 'nosniff' };
  return new Response(null, { status: 302, headers });
});

/** The bytes are in the store: check them. Asking again tells how the PDF stands. */
export const POST = writeRoute(z.strictObject({}), 'upload_step', async ({ viewer, params }) => {
  const { id, state, refusal, objectKey, sizeBytes, sha256 } = await requireOwnDocument(
    viewer,
    params.documentId ?? '',
  );
  if (state === 'refused') return { state, message: refusal };
  if (state === 'ready' || !objectKey || sizeBytes === null || sha256 === null) return { state: 'ready' };
  return checkDocument({ id, objectKey, sizeBytes, sha256 });
});

/** Leaves a PDF out that nobody was asked to sign. */
export const DELETE = writeRoute(z.strictObject({}), 'upload_step', async ({ viewer, params }) => {
  await discardDocument(viewer, params.documentId ?? '', Date.now());
  return {};
});
