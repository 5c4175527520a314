import type { IncomingMessage, ServerResponse } from 'node:http';
import { answerFaultDoor } from '../fault-door';
import { createFaultSwitch } from '../faults';
import { listenOnLoopback, type RunningFake } from '../loopback';
import { createAcceptance } from './acceptance';
import { jsonAnswer, refusalAnswer, sendAnswer, type Answer } from './answer';
import { openMailbox, type Mailbox } from './mailbox';
import { answerReading } from './reading';
import { Refusal } from './refusal';
import { answerSending, type SendingDesk } from './sending';

export interface MailRoomOptions {
  /** 0 takes a free port. */
  port: number;
  dataDir: string;
  apiKey: string;
  /** The clock, in milliseconds since 1970. */
  now?: () => number;
}

interface Room {
  mailbox: Mailbox;
  desk: SendingDesk;
}

async function answerRequest({ mailbox, desk }: Room, request: IncomingMessage, url: URL): Promise<Answer | undefined> {
  if (url.pathname === '/emails' || url.pathname === '/emails/batch') return answerSending(desk, request, url.pathname);
  if (request.method === 'DELETE' && url.pathname === '/mails') {
    await mailbox.empty();
    return jsonAnswer(200, { emptied: true });
  }
  if (request.method === 'GET' || request.method === 'HEAD') return answerReading(mailbox, url);
  throw new Refusal('not_found', 'The mail room has no such address.');
}

async function answerOrRefuse(room: Room, request: IncomingMessage, url: URL): Promise<Answer | undefined> {
  try {
    return await answerRequest(room, request, url);
  } catch (error) {
    if (error instanceof Refusal) return refusalAnswer(error);
    if (!request.errored) console.error('mail room:', error);
    return refusalAnswer(new Refusal('internal_server_error', 'The mail room failed.'));
  }
}

async function serve(room: Room, request: IncomingMessage, response: ServerResponse): Promise<void> {
  const url = new URL(`http://mail-room.test${request.url ?? '/'}`);
  if (url.pathname === '/_fail') return answerFaultDoor(request, response, room.desk.faults);
  const answer = await answerOrRefuse(room, request, url);
  if (answer === undefined) response.destroy();
  else sendAnswer(response, answer);
}

/**
 * Starts a local mail room that takes mail as the Resend HTTP API does, keeps it as JSON files and shows it in a browser.
 * It listens on the loopback address only and sends nothing on.
 */
export async function startMailRoom(options: MailRoomOptions): Promise<RunningFake> {
  const mailbox = await openMailbox(options.dataDir);
  const acceptance = createAcceptance(mailbox, options.now ?? Date.now);
  const room: Room = { mailbox, desk: { apiKey: options.apiKey, acceptance, faults: createFaultSwitch() } };
  return listenOnLoopback(options.port, (request, response) => {
    serve(room, request, response).catch(() => response.destroy());
  });
}
