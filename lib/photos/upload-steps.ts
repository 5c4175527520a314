import { isPassing, type Answer } from './upload-answer';
import type { UploadState } from './upload-state';

/** A link that takes exactly one photo, and the headers that must go with it, no more and no fewer. */
export type UploadLink = { url: string; headers: Record<string, string> };

export type Grant =
  | { state: 'granted'; id: string; upload: UploadLink }
  | { state: 'uploaded' | 'ready'; id: string }
  | { state: 'refused'; id: string; message: string };

export type Checked = { state: 'ready' | 'missing' } | { state: 'refused'; message: string };

/** What is to be done next for a photo. `clear` takes back a promise whose bytes never arrived. */
export type UploadStep =
  | { do: 'ask' }
  | { do: 'send'; photoId: string; link: UploadLink }
  | { do: 'check'; photoId: string }
  | { do: 'clear'; photoId: string };

export type Outcome =
  | { kind: 'next'; step: UploadStep }
  | { kind: 'wait'; step: UploadStep; message: string; leastMs?: number }
  | { kind: 'settled'; upload: Extract<UploadState, { step: 'ready' | 'refused' | 'failed' }> };

export const GIVEN_UP = 'The shop could not take this photo. Try again, or leave it out and choose another.';
const NO_SIGNAL = 'No signal. It goes up by itself when there is some.';
const NO_STORE = 'The photo store does not answer. It is tried again by itself.';
const BUSY = 'The shop does not answer just now. It is tried again by itself.';
const SIGNED_OUT = 'You are signed out. Sign in again, and it goes on by itself.';

const next = (step: UploadStep): Outcome => ({ kind: 'next', step });
const failed = (message: string): Outcome => ({ kind: 'settled', upload: { step: 'failed', message } });
const refused = (message: string): Outcome => ({ kind: 'settled', upload: { step: 'refused', message } });
const ready = (photoId: string): Outcome => ({ kind: 'settled', upload: { step: 'ready', photoId } });

export function afterAsk(answer: Answer<Grant>): Outcome {
  if (answer.kind !== 'ok') return trouble(answer, { do: 'ask' });
  const grant = answer.body;
  switch (grant.state) {
    case 'granted':
      return next({ do: 'send', photoId: grant.id, link: grant.upload });
    case 'uploaded':
      return next({ do: 'check', photoId: grant.id });
    case 'ready':
      return ready(grant.id);
    case 'refused':
      return refused(grant.message);
  }
}

/** 412 means that an earlier try did arrive, 403 that the link is too old, 409 that two tries met in the store. */
export function afterSend(answer: Answer<null>, step: Extract<UploadStep, { do: 'send' }>): Outcome {
  const check: UploadStep = { do: 'check', photoId: step.photoId };
  if (answer.kind === 'ok') return next(check);
  if (answer.kind === 'no-signal') return { kind: 'wait', step, message: NO_STORE };
  if (answer.status === 412) return next(check);
  if (answer.status === 403) return next({ do: 'ask' });
  if (answer.status === 409 || isPassing(answer.status))
    return { kind: 'wait', step, message: NO_STORE, leastMs: answer.retryAfterMs };
  return failed('The photo store did not take this photo. Try again, or choose it anew.');
}

/** 404 means that the promise is gone, as after a day; the photo starts afresh. */
export function afterCheck(answer: Answer<Checked>, step: Extract<UploadStep, { do: 'check' }>): Outcome {
  if (answer.kind !== 'ok')
    return answer.kind === 'status' && answer.status === 404 ? next({ do: 'ask' }) : trouble(answer, step);
  if (answer.body.state === 'ready') return ready(step.photoId);
  if (answer.body.state === 'refused') return refused(answer.body.message);
  return next({ do: 'clear', photoId: step.photoId });
}

export function afterClear(answer: Answer<object>, step: UploadStep): Outcome {
  return answer.kind === 'ok' ? next({ do: 'ask' }) : trouble(answer, step);
}

function trouble(answer: Exclude<Answer<never>, { kind: 'ok' }>, step: UploadStep): Outcome {
  if (answer.kind === 'no-signal') return { kind: 'wait', step, message: NO_SIGNAL };
  const { status, message, fields, retryAfterMs: leastMs } = answer;
  if (status === 401) return { kind: 'wait', step, message: SIGNED_OUT };
  if (status === 429) return { kind: 'wait', step, message: message ?? BUSY, leastMs };
  if (isPassing(status)) return { kind: 'wait', step, message: BUSY, leastMs };
  if (status === 422) return refused(Object.values(fields ?? {})[0] ?? message ?? GIVEN_UP);
  return failed(message ?? GIVEN_UP);
}
