import { createServer, type Server } from 'node:http';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { sendJson, wordIn } from '@/lib/send-json';

type Canned = { status: number; body: string; retryAfter?: string };

let server: Server;
let base = '';

/** Answers with what the address asks for, so that a test says on one line what the door does. */
beforeAll(async () => {
  server = createServer((request, response) => {
    const canned: Canned = JSON.parse(decodeURIComponent((request.url ?? '').slice(1)));
    if (canned.status === 0) return request.socket.destroy();
    response.writeHead(canned.status, canned.retryAfter ? { 'Retry-After': canned.retryAfter } : {});
    response.end(canned.body);
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const address = server.address();
  base = typeof address === 'object' && address ? `http://127.0.0.1:${address.port}` : '';
});

afterAll(() => new Promise((resolve) => server.close(resolve)));

const send = (canned: Canned, isOnline = true) =>
  sendJson(`${base}/${encodeURIComponent(JSON.stringify(canned))}`, { idempotencyKey: 'k'.repeat(20) }, () => isOnline);

async function refusedBy(canned: Canned, isOnline = true) {
  const sent = await send(canned, isOnline);
  if (sent.ok) throw new Error('it was taken');
  return sent.refused;
}

describe('sending JSON', () => {
  test('an answer of the door comes through', async () => {
    const sent = await send({ status: 200, body: '{"id":"q1"}' });
    expect(sent).toMatchObject({ ok: true });
    expect(sent.ok && wordIn(sent.answer, 'id')).toBe('q1');
  });

  test('a refusal keeps the door’s sentence and its fields', async () => {
    const body = JSON.stringify({ message: 'Look again.', fields: { subject: 'Give it a heading.' } });
    const refused = { status: 422, message: 'Look again.', fields: { subject: 'Give it a heading.' } };
    expect(await refusedBy({ status: 422, body })).toEqual(refused);
  });

  test.each([
    { status: 401, says: /signed out/ },
    { status: 409, says: /changed in the meantime/ },
    { status: 413, says: /too long/ },
    { status: 429, says: /in 40 seconds/, retryAfter: '40' },
    { status: 503, says: /busy just now.*in a minute/ },
    { status: 500, says: /on our side/ },
    { status: 0, says: /gave no answer.*send it again/ },
  ])('a $status without words of its own becomes a sentence with a next step', async ({ status, says, retryAfter }) => {
    const refused = await refusedBy({ status, body: '<html>Bad gateway</html>', retryAfter });
    expect(refused.message).toMatch(says);
    expect(refused).toMatchObject({ status, fields: {} });
  });

  test('without a connection it says so, and that the words are kept', async () => {
    const { message } = await refusedBy({ status: 0, body: '' }, false);
    expect(message).toMatch(/offline.*kept here/);
  });

  test('a page that is not JSON is never taken for success', async () => {
    expect(await send({ status: 200, body: '<html>Sign in to the guest network</html>' })).toMatchObject({ ok: false });
  });
});
