import type { ServerResponse } from 'node:http';
import type { Refusal } from './refusal';

export interface Answer {
  status: number;
  headers: Record<string, string>;
  body: string | Buffer;
}

export function jsonAnswer(status: number, value: unknown, headers: Record<string, string> = {}): Answer {
  return {
    status,
    headers: { 'content-type': 'application/json; charset=utf-8', ...headers },
    body: JSON.stringify(value),
  };
}

export function refusalAnswer({ status, reason, message }: Refusal): Answer {
  return jsonAnswer(status, { statusCode: status, name: reason, message });
}

export function sendAnswer(response: ServerResponse, { status, headers, body }: Answer): void {
  response
    .writeHead(status, { 'cache-control': 'no-store', 'x-content-type-options': 'nosniff', ...headers })
    .end(body);
}
