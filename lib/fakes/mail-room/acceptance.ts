import { createHash, randomUUID } from 'node:crypto';
import type { Draft } from './draft';
import type { Delivery, Mail, Mailbox } from './mailbox';
import { Refusal } from './refusal';

const KEY_MEMORY_MS = 24 * 60 * 60_000;
const KEY_LIMIT = 256;

export interface Submission {
  /** Path and body, exactly as they came. */
  path: string;
  body: Buffer;
  idempotencyKey: string | null;
  drafts: Draft[];
}

export interface Acceptance {
  /**
   * Takes mails in once per idempotency key; a repeat within 24 hours gets the ids of the first time.
   * `settle` runs while the key still counts as in flight.
   * @throws Refusal when the key is malformed, in flight, or was used with another body
   */
  accept(submission: Submission, settle: () => Promise<void>): Promise<string[]>;
}

function fingerprintOf({ path, body }: Submission): string {
  return createHash('sha256').update(path).update('\n').update(body).digest('hex');
}

function findRepeat(mailbox: Mailbox, { idempotencyKey }: Submission, now_ms: number): Delivery | undefined {
  if (idempotencyKey === null) return undefined;
  return mailbox
    .deliveries()
    .findLast((past) => past.idempotencyKey === idempotencyKey && now_ms - past.acceptedAt_ms < KEY_MEMORY_MS);
}

async function takeIn(mailbox: Mailbox, submission: Submission, now_ms: number): Promise<string[]> {
  const { idempotencyKey, drafts } = submission;
  const fingerprint = fingerprintOf(submission);
  const repeat = findRepeat(mailbox, submission, now_ms);
  if (repeat !== undefined && repeat.fingerprint !== fingerprint) {
    throw new Refusal('invalid_idempotent_request', 'This idempotency key was used with another request.');
  }
  if (repeat !== undefined) return repeat.mails.map(({ id }) => id);
  const createdAt = new Date(now_ms).toISOString();
  const mails = drafts.map((draft): Mail => ({ ...draft, id: randomUUID(), createdAt, idempotencyKey }));
  await mailbox.add({ acceptedAt_ms: now_ms, idempotencyKey, fingerprint, mails });
  return mails.map(({ id }) => id);
}

export function createAcceptance(mailbox: Mailbox, now: () => number): Acceptance {
  const inFlight = new Set<string>();
  return {
    accept: async (submission, settle) => {
      const key = submission.idempotencyKey;
      if (key !== null && (key.length < 1 || key.length > KEY_LIMIT)) {
        throw new Refusal('invalid_idempotency_key', `An idempotency key has 1 to ${KEY_LIMIT} characters.`);
      }
      if (key !== null && inFlight.has(key)) {
        throw new Refusal('concurrent_idempotent_requests', 'A request with this idempotency key is still under way.');
      }
      if (key !== null) inFlight.add(key);
      try {
        const ids = await takeIn(mailbox, submission, now());
        await settle();
        return ids;
      } finally {
        if (key !== null) inFlight.delete(key);
      }
    },
  };
}
