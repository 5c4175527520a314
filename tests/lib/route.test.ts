import { beforeEach, describe, expect, test, vi } from 'vitest';
import { z } from 'zod';
import { Denied, OutOfReach } from '@/lib/errors';
import { limits } from '@/lib/rate-limits';
import { MAX_BODY_BYTES, readRoute, writeRoute } from '@/lib/route';
import { openTestDatabase } from '../support/database';
import { makePerson, makeSession } from '../support/world';

const request = vi.hoisted(() => ({ cookie: '' }));
vi.mock('next/headers', () => ({ cookies: async () => ({ get: () => ({ value: request.cookie }) }) }));
vi.mock('next/server', () => ({ after: () => undefined }));

await openTestDatabase();

const ORIGIN = 'https://diary.example';
const own = { origin: ORIGIN, 'content-type': 'application/json' };
const note = z.strictObject({ text: z.string().min(1, 'Write a line.') });

let done = 0;
const write = writeRoute(note, 'manage', async ({ viewer, input }) => {
  done += 1;
  return { who: viewer.id, text: input.text };
});

beforeEach(async () => {
  done = 0;
  request.cookie = await makeSession((await makePerson('buyer')).id);
});

type Sent = { headers?: Record<string, string>; body?: BodyInit; handler?: typeof write };

async function send({ headers = own, body = '{"text":"x"}', handler = write }: Sent = {}) {
  const init: RequestInit & { duplex: 'half' } = { method: 'POST', headers, body, duplex: 'half' };
  const sent = new Request(`${ORIGIN}/api/notes`, init);
  const answer = await handler(sent, { params: Promise.resolve({}) });
  return { status: answer.status, headers: answer.headers, body: await answer.json() };
}

describe('a door that changes something', () => {
  test('does its work for its own page, and no cache keeps the answer', async () => {
    const { status, headers, body } = await send();
    expect({ status, body }).toMatchObject({ status: 200, body: { text: 'x' } });
    expect(headers.get('cache-control')).toBe('private, no-store');
    expect(headers.get('x-content-type-options')).toBe('nosniff');
    expect(done).toBe(1);
  });

  // SECURITY.md P12.
  test.each([
    { from: 'another site', headers: { ...own, origin: 'https://other.example' } },
    { from: 'a sister address', headers: { ...own, origin: 'https://www.diary.example' } },
    { from: 'the same name without https', headers: { ...own, origin: 'http://diary.example' } },
    { from: 'a sandboxed frame', headers: { ...own, origin: 'null' } },
    { from: 'nowhere that it would tell', headers: { 'content-type': 'application/json' } },
    { from: 'another site, by fetch metadata', headers: { ...own, 'sec-fetch-site': 'cross-site' } },
    { from: 'the same site only', headers: { ...own, 'sec-fetch-site': 'same-site' } },
    { from: 'the address bar', headers: { ...own, 'sec-fetch-site': 'none' } },
    {
      from: 'another site with a forwarded host to match',
      headers: { ...own, origin: 'https://other.example', 'x-forwarded-host': 'other.example', host: 'other.example' },
    },
  ])('refuses what comes from $from, signed in or not', async ({ headers }) => {
    expect((await send({ headers })).status).toBe(403);
    request.cookie = '';
    expect((await send({ headers })).status).toBe(403);
    expect(done).toBe(0);
  });

  test('refuses whoever is signed out', async () => {
    request.cookie = 'no-such-session';
    expect(await send()).toMatchObject({ status: 401, body: { message: expect.stringContaining('signed out') } });
    expect(done).toBe(0);
  });

  test.each([
    'text/plain',
    'application/x-www-form-urlencoded',
    'multipart/form-data; boundary=x',
    '',
    'application/jsonp',
  ])('reads JSON only, not %j', async (type) => {
    expect((await send({ headers: { ...own, 'content-type': type } })).status).toBe(400);
    expect(done).toBe(0);
  });

  test.each(['', '{', '{"text":"x"', 'undefined', '{"text":"x"}}', '\u0000'])(
    'says of garbled JSON that it was garbled: %j',
    async (body) => {
      expect(await send({ body })).toMatchObject({ status: 400, body: { message: expect.stringContaining('again') } });
      expect(done).toBe(0);
    },
  );

  test.each([
    { what: 'an empty field', body: '{"text":""}', fields: { text: 'Write a line.' } },
    {
      what: 'a field that it does not know',
      body: '{"text":"x","role":"admin"}',
      fields: { form: expect.any(String) },
    },
    { what: 'a list', body: '[]', fields: { form: expect.any(String) } },
    { what: 'nothing', body: 'null', fields: { form: expect.any(String) } },
  ])('answers $what with a sentence at its field', async ({ body, fields }) => {
    expect(await send({ body })).toMatchObject({ status: 422, body: { fields } });
    expect(done).toBe(0);
  });

  // SECURITY.md P31: 413, never silently cut.
  test('refuses 1 MB with a sentence, whether or not its length is told', async () => {
    const large = JSON.stringify({ text: 'x'.repeat(1024 * 1024) });
    const refusal = {
      status: 413,
      body: { message: 'That is too long to keep. Shorten it, or split it into two entries.' },
    };
    expect(await send({ body: large })).toMatchObject(refusal);
    expect(await send({ body: large, headers: { ...own, 'content-length': '20' } })).toMatchObject(refusal);
    expect(await send({ body: new Blob([large]).stream() })).toMatchObject(refusal);
    expect(done).toBe(0);
  });

  test('takes a body of exactly the limit, and not a byte more', async () => {
    const sized = (bytes: number) => JSON.stringify({ text: 'x'.repeat(bytes - JSON.stringify({ text: '' }).length) });
    expect((await send({ body: sized(MAX_BODY_BYTES) })).status).toBe(200);
    expect((await send({ body: sized(MAX_BODY_BYTES + 1) })).status).toBe(413);
  });

  test('stops reading an endless body', async () => {
    let sent = 0;
    const endless = new ReadableStream<Uint8Array>({
      pull: (controller) => {
        sent += 1;
        controller.enqueue(new Uint8Array(64 * 1024));
      },
    });
    expect((await send({ body: endless })).status).toBe(413);
    expect(sent).toBeLessThan(20);
  });

  test('refuses the one too many, says when to come back, and counts for each person alone', async () => {
    const handler = writeRoute(note, 'question', async () => ({}));
    for (let n = 0; n < limits.question.capacity; n++) expect((await send({ handler })).status).toBe(200);
    const { status, headers, body } = await send({ handler });
    expect({ status, body }).toMatchObject({ status: 429, body: { message: expect.stringContaining('again in') } });
    expect(Number(headers.get('retry-after'))).toBeGreaterThan(0);
    request.cookie = await makeSession((await makePerson('buyer')).id);
    expect((await send({ handler })).status).toBe(200);
  });

  test('a refused request uses up nothing of the limit', async () => {
    const handler = writeRoute(note, 'question', async () => ({}));
    for (let n = 0; n < 30; n++) await send({ handler, body: '{"text":""}' });
    expect((await send({ handler })).status).toBe(200);
  });
});

describe('what goes wrong behind a door', () => {
  const answers = [
    { error: new OutOfReach('Q-2417'), status: 404, message: 'There is nothing here for you.' },
    { error: new Denied('not_allowed', 'Not yours.'), status: 403, message: 'Not yours.' },
    { error: new Denied('conflict', 'Saved by another.'), status: 409, message: 'Saved by another.' },
    { error: new Denied('busy', 'Busy just now.', 5), status: 503, message: 'Busy just now.' },
  ];
  test.each(answers)(
    'answers $status with its sentence and nothing of the inside',
    async ({ error, status, message }) => {
      const handler = writeRoute(note, 'manage', () => Promise.reject(error));
      const answer = await send({ handler });
      expect(answer).toMatchObject({ status, body: { message } });
      expect(Object.keys(answer.body)).toEqual(['message']);
      expect(answer.headers.get('retry-after')).toBe(status === 503 ? '5' : null);
    },
  );

  test('a fault of ours tells nobody what it was', async () => {
    const handler = writeRoute(note, 'manage', () => Promise.reject(new Error('SQLITE_CORRUPT at /var/diary.db')));
    const answer = await send({ handler });
    expect(answer.status).toBe(500);
    expect(JSON.stringify(answer.body)).not.toMatch(/SQLITE|diary\.db/);
  });

  test('reading is for the signed-in only', async () => {
    const read = readRoute(async ({ viewer }) => ({ who: viewer.id }));
    const get = () => read(new Request(ORIGIN), { params: Promise.resolve({}) });
    expect((await get()).status).toBe(200);
    request.cookie = '';
    expect((await get()).status).toBe(401);
  });
});
