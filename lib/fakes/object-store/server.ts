import type { IncomingMessage, ServerResponse } from 'node:http';
import { setTimeout as pause } from 'node:timers/promises';
import { createFaultSwitch, type Fault, type FaultSwitch } from '../faults';
import { answerFaultDoor } from '../fault-door';
import { listenOnLoopback, type RunningFake } from '../loopback';
import { sendAnswer, type Answer } from './answer';
import { authenticate, type Account } from './authentication';
import { corsHeaders, preflightHeaders } from './cors';
import { runOperation } from './operations';
import { Refusal } from './refusal';
import { readRequest } from './request';
import { openStore, type Store } from './store';
import { refusalAnswer } from './xml';

export interface ObjectStoreOptions extends Account {
  /** 0 takes a free port. */
  port: number;
  dataDir: string;
  /** Made at the start when they are missing. */
  buckets: string[];
  /** Origins whose pages may read and write with a presigned address. */
  allowedOrigins: string[];
  /** The clock, in milliseconds since 1970. */
  now?: () => number;
}

interface Room {
  options: ObjectStoreOptions;
  store: Store;
  faults: FaultSwitch;
  now: () => number;
}

async function operate({ options, store, now }: Room, message: IncomingMessage): Promise<Answer> {
  const now_ms = now();
  const request = readRequest(message);
  const claim = authenticate(request, options, now_ms);
  return runOperation(store, request, claim, now_ms);
}

async function operateOrRefuse(room: Room, message: IncomingMessage): Promise<Answer> {
  try {
    return await operate(room, message);
  } catch (error) {
    const refusal = error instanceof Refusal ? error : new Refusal('InternalError', 'The store failed.');
    if (refusal !== error && !message.errored) console.error('object store:', error);
    const answer = refusalAnswer(refusal, message.url ?? '');
    return message.method === 'HEAD' ? { status: answer.status } : answer;
  }
}

/** Undefined means that the connection is to be cut. */
async function answerWithFault(room: Room, message: IncomingMessage, fault: Fault): Promise<Answer | undefined> {
  if (fault.afterAccepting) await operateOrRefuse(room, message);
  await pause(fault.hold_ms);
  if (fault.status === 0) return undefined;
  const refusal = new Refusal(fault.status === 503 ? 'SlowDown' : 'InternalError', 'The store was told to fail.');
  return { ...refusalAnswer(refusal, message.url ?? ''), status: fault.status };
}

function answerPreflight(room: Room, message: IncomingMessage): Answer {
  const headers = preflightHeaders(message, room.options.allowedOrigins);
  if (headers !== undefined) return { status: 200, headers };
  return refusalAnswer(new Refusal('AccessDenied', 'This origin may not do that.'), message.url ?? '');
}

async function serve(room: Room, message: IncomingMessage, response: ServerResponse): Promise<void> {
  if (message.url === '/_fail') return answerFaultDoor(message, response, room.faults);
  for (const [name, value] of Object.entries(corsHeaders(message, room.options.allowedOrigins))) {
    response.setHeader(name, value);
  }
  if (message.method === 'OPTIONS') return sendAnswer(response, answerPreflight(room, message));
  const fault = room.faults.take();
  const answer = fault ? await answerWithFault(room, message, fault) : await operateOrRefuse(room, message);
  if (answer === undefined) response.destroy();
  else await sendAnswer(response, answer);
}

/**
 * Starts a local object store that speaks and checks as much of S3 (path style) as the shop needs.
 * It listens on the loopback address only. Not in it: multipart uploads, versions, delimiters, signed chunks.
 */
export async function startObjectStore(options: ObjectStoreOptions): Promise<RunningFake> {
  const store = await openStore(options.dataDir);
  for (const bucket of options.buckets) await store.createBucket(bucket);
  const room: Room = { options, store, faults: createFaultSwitch(), now: options.now ?? Date.now };
  return listenOnLoopback(options.port, (message, response) => {
    serve(room, message, response).catch(() => response.destroy());
  });
}
