import type { IncomingMessage, ServerResponse } from 'node:http';
import { answerFaultDoor } from '../fault-door';
import { createFaultSwitch } from '../faults';
import { listenOnLoopback, type RunningFake } from '../loopback';
import { createAcceptance } from './acceptance';
import { jsonAnswer, refusalAnswer, sendAnswer, type Answer } from './answer';
import { openMailbox, type Mailbox } from './mailbox';
import { answerReading } from './reading';
import { Refusal } from './refusal';
import { answerReader, type ReaderDesk } from './reader-desk';
import { createReceivedMails } from './received';
import { answerSending, checkKey, type SendingDesk } from './sending';
import type { WebhookTarget } from './webhooks';

export interface MailRoomOptions {
  /** 0 takes a free port. */
  port: number;
  dataDir: string;
  apiKey: string;
  /** Who is told of answers and of what became of mails; nobody when missing. */
  webhook?: WebhookTarget;
  /** The clock, in milliseconds since 1970. */
  now?: () => number;
}

interface Room {
  mailbox: Mailbox;
  desk: SendingDesk;
  reader: ReaderDesk;
}

async function answerRequest(room: Room, request: IncomingMessage, url: URL): Promise<Answer | undefined> {
  const { mailbox, desk, reader } = room;
  if (url.pathname === '/emails' || url.pathname === '/emails/batch') return answerSending(desk, request, url.pathname);
  if (request.method === 'DELETE' && url.pathname === '/mails') {
    await mailbox.empty();
    return jsonAnswer(200, { emptied: true });
  }
  if (/^\/mail\/[0-9a-f-]{36}\/(?:reply|events)$/.test(url.pathname) && request.method === 'POST')
    return answerReader(reader, request, url.pathname);
  if (request.method === 'GET' || request.method === 'HEAD') {
    if (url.pathname.startsWith('/emails/receiving/')) {
      checkKey(request, desk.apiKey);
      return reader.received.describe(url.pathname, `http://${request.headers.host ?? ''}`);
    }
    if (url.pathname.startsWith('/received/')) return reader.received.file(url.pathname);
    return answerReading(mailbox, url, reader.webhook !== undefined);
  }
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
  const now = options.now ?? Date.now;
  const room: Room = {
    mailbox,
    desk: { apiKey: options.apiKey, acceptance, faults: createFaultSwitch() },
    reader: { mailbox, received: createReceivedMails(), webhook: options.webhook, now },
  };
  return listenOnLoopback(options.port, (request, response) => {
    serve(room, request, response).catch(() => response.destroy());
  });
}
