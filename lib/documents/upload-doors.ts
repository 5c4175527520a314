import type { DocumentDoors } from './upload-document';
import { callShop } from '@/lib/photos/upload-answer';
import { pause } from '@/lib/photos/upload-delay';
import { measure, send } from '@/lib/photos/upload-transport';

/** The shop reads one drawing after another; a large one takes it some seconds. */
const CHECK_MS = 120_000;

/** The real doors for PDFs. */
export const documentDoors: DocumentDoors = {
  measure,
  ask: (body, signal) => callShop({ method: 'POST', url: '/api/documents', body, signal }),
  send,
  check: (documentId, signal) =>
    callShop({
      method: 'POST',
      url: `/api/documents/${encodeURIComponent(documentId)}`,
      body: {},
      signal,
      patienceMs: CHECK_MS,
    }),
  pause,
  random: Math.random,
};
