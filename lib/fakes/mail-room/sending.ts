import { createHash, timingSafeEqual } from 'node:crypto';
import type { IncomingMessage } from 'node:http';
import { setTimeout as pause } from 'node:timers/promises';
import { BodyTooLarge, readSmallBody } from '../body';
import type { Fault, FaultSwitch } from '../faults';
import type { Acceptance, Submission } from './acceptance';
import { jsonAnswer, type Answer } from './answer';
import { readDraft, type Draft } from './draft';
import { Refusal } from './refusal';

const BODY_LIMIT_BYTES = 50 * 1_024 * 1_024;
const BATCH_LIMIT = 100;

export interface SendingDesk {
  apiKey: string;
  acceptance: Acceptance;
  faults: FaultSwitch;
}

function sha256(text: string): Buffer {
  return createHash('sha256').update(text).digest();
}

/** @throws Refusal unless the request carries the API key */
export function checkKey(request: IncomingMessage, apiKey: string): void {
  const given = /^Bearer +(\S+)$/i.exec(request.headers.authorization ?? '')?.[1];
  if (given === undefined) throw new Refusal('missing_api_key', 'Send the API key as a bearer token.');
  if (!timingSafeEqual(sha256(given), sha256(apiKey))) throw new Refusal('invalid_api_key', 'The API key is wrong.');
}

function parse(body: Buffer): unknown {
  try {
    const value: unknown = JSON.parse(body.toString('utf8'));
    return value;
  } catch {
    throw new Refusal('validation_error', 'The body is not JSON.');
  }
}

/** One bad mail refuses the whole batch, as strict validation does. */
function readBatch(value: unknown, request: IncomingMessage): Draft[] {
  if ((request.headers['x-batch-validation'] ?? 'strict') !== 'strict') {
    throw new Refusal('validation_error', 'The local mail room checks batches strictly only.');
  }
  if (!Array.isArray(value) || value.length < 1 || value.length > BATCH_LIMIT) {
    throw new Refusal('validation_error', `A batch is a list of 1 to ${BATCH_LIMIT} mails.`);
  }
  return value.map((item: unknown, index) => {
    try {
      const draft = readDraft(item);
      if (draft.attachments.length > 0) throw new Refusal('validation_error', 'A batch takes no attachments.');
      return draft;
    } catch (error) {
      if (!(error instanceof Refusal)) throw error;
      throw new Refusal(error.reason, `Mail ${index + 1} of the batch: ${error.message}`);
    }
  });
}

async function readSubmission(request: IncomingMessage, path: string): Promise<Submission> {
  const body = await readSmallBody(request, BODY_LIMIT_BYTES).catch((error: unknown) => {
    if (error instanceof BodyTooLarge) throw new Refusal('validation_error', 'The request is too large.');
    throw error;
  });
  const value = parse(body);
  const drafts = path === '/emails/batch' ? readBatch(value, request) : [readDraft(value)];
  const key = request.headers['idempotency-key'];
  return { path, body, idempotencyKey: typeof key === 'string' ? key : null, drafts };
}

function faultAnswer({ status, retryAfter_s }: Fault): Answer | undefined {
  if (status === 0) return undefined;
  const name = status === 429 ? 'rate_limit_exceeded' : 'internal_server_error';
  const headers: Record<string, string> = retryAfter_s === undefined ? {} : { 'retry-after': String(retryAfter_s) };
  return jsonAnswer(status, { statusCode: status, name, message: 'The mail room was told to fail.' }, headers);
}

/** Answers `POST /emails` and `POST /emails/batch`; undefined means that the connection is to be cut. */
export async function answerSending(
  desk: SendingDesk,
  request: IncomingMessage,
  path: string,
): Promise<Answer | undefined> {
  if (request.method !== 'POST') throw new Refusal('method_not_allowed', 'Use POST.');
  checkKey(request, desk.apiKey);
  const fault = desk.faults.take();
  const hold = () => pause(fault?.hold_ms ?? 0).then(() => undefined);
  if (fault !== undefined && !fault.afterAccepting) {
    await hold();
    return faultAnswer(fault);
  }
  const ids = await desk.acceptance.accept(await readSubmission(request, path), hold);
  if (fault !== undefined) return faultAnswer(fault);
  const [id] = ids;
  return jsonAnswer(200, path === '/emails/batch' ? { data: ids.map((one) => ({ id: one })) } : { id });
}
