import type { UploadTransport } from './upload-walk';
import { callShop, retryAfter, type Answer } from './upload-answer';
import type { UploadLink } from './upload-steps';

/** A transfer that has not moved for this long is taken for a lost connection. */
const STALL_MS = 30_000;
/** The shop looks at one photo after another; each may take it several seconds. */
const CHECK_MS = 120_000;

/** The real doors, for one build's photos. */
export function shopTransport(orderNumber: string): UploadTransport {
  const grants = `/api/builds/${encodeURIComponent(orderNumber)}/photos`;
  const photo = (photoId: string) => `/api/photos/${encodeURIComponent(photoId)}`;
  return {
    measure,
    ask: (body, signal) => callShop({ method: 'POST', url: grants, body, signal }),
    send,
    check: (photoId, signal) =>
      callShop({ method: 'POST', url: photo(photoId), body: {}, signal, patienceMs: CHECK_MS }),
    discard: (photoId) => callShop({ method: 'DELETE', url: photo(photoId), body: {} }),
  };
}

/** SHA-256 in base64. @throws when the bytes cannot be read */
export async function measure(blob: Blob): Promise<string> {
  const digest = await crypto.subtle.digest('SHA-256', await blob.arrayBuffer());
  return btoa(String.fromCharCode(...new Uint8Array(digest)));
}

/** Puts a blob behind a link. XMLHttpRequest, because fetch does not tell how much of a body has left. */
export function send(
  link: UploadLink,
  blob: Blob,
  onShare: (share: number) => void,
  signal: AbortSignal,
): Promise<Answer<null>> {
  return new Promise((resolve) => {
    if (signal.aborted) return resolve({ kind: 'no-signal' });
    const request = new XMLHttpRequest();
    const giveUp = () => request.abort();
    let stall = setTimeout(giveUp, STALL_MS);
    request.open('PUT', link.url);
    for (const [name, value] of Object.entries(link.headers)) request.setRequestHeader(name, value);
    request.upload.onprogress = ({ loaded, total }) => {
      clearTimeout(stall);
      stall = setTimeout(giveUp, STALL_MS);
      onShare(total > 0 ? loaded / total : 0);
    };
    request.onloadend = () => {
      clearTimeout(stall);
      signal.removeEventListener('abort', giveUp);
      resolve(answerOf(request));
    };
    signal.addEventListener('abort', giveUp, { once: true });
    request.send(blob);
  });
}

function answerOf(request: XMLHttpRequest): Answer<null> {
  const { status } = request;
  if (status === 0) return { kind: 'no-signal' };
  if (status < 300) return { kind: 'ok', body: null };
  return { kind: 'status', status, retryAfterMs: retryAfter(readableRetryAfter(request)) };
}

/** Asked for by name, a header that the store does not let this page read would be a console error. */
function readableRetryAfter(request: XMLHttpRequest): string | null {
  return /^retry-after:\s*(\d+)/im.exec(request.getAllResponseHeaders())?.[1] ?? null;
}
