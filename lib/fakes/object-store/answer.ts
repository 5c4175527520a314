import type { ServerResponse } from 'node:http';
import type { Readable } from 'node:stream';
import { finished, pipeline } from 'node:stream/promises';

const DRAIN_LIMIT_MS = 2_000;

/** What an operation hands back to be sent. */
export interface Answer {
  status: number;
  headers?: Record<string, string>;
  body?: string | Readable;
}

/** Lets an unread request body come in for a while, so that closing the connection does not take the answer with it. */
async function drain(response: ServerResponse): Promise<void> {
  const ended = finished(response.req.resume(), { signal: AbortSignal.timeout(DRAIN_LIMIT_MS) });
  await ended.catch(() => undefined);
}

async function sendText(response: ServerResponse, { status, headers }: Answer, body: string): Promise<void> {
  const bytes = Buffer.from(body);
  const isBodyUnread = !response.req.complete;
  if (isBodyUnread) response.setHeader('connection', 'close');
  response.writeHead(status, { 'content-length': bytes.length, ...headers });
  response.write(bytes);
  if (isBodyUnread) await drain(response);
  response.end();
}

export async function sendAnswer(response: ServerResponse, answer: Answer): Promise<void> {
  const { status, headers, body } = answer;
  if (typeof body === 'string') return sendText(response, answer, body);
  response.writeHead(status, headers);
  if (body === undefined) response.end();
  else await pipeline(body, response);
}
