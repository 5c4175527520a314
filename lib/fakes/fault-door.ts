import type { IncomingMessage, ServerResponse } from 'node:http';
import { readJson } from './body';
import { readFault, type FaultSwitch } from './faults';

const LIMIT_BYTES = 4_096;

function answer(response: ServerResponse, status: number, text: string): void {
  response.writeHead(status, { 'content-type': 'text/plain; charset=utf-8' }).end(`${text}\n`);
}

/** `POST /_fail` sets the fault, `DELETE /_fail` clears it. No sign-in: the stand-ins listen on the loopback address only. */
export async function answerFaultDoor(request: IncomingMessage, response: ServerResponse, faults: FaultSwitch) {
  if (request.method === 'DELETE') {
    faults.clear();
    return answer(response, 200, 'No fault is set.');
  }
  if (request.method !== 'POST') return answer(response, 405, 'Use POST or DELETE.');
  try {
    faults.set(readFault(await readJson(request, LIMIT_BYTES)));
    answer(response, 200, 'The fault is set.');
  } catch (error) {
    answer(response, 400, error instanceof RangeError ? error.message : 'Send a small JSON object.');
  }
}
