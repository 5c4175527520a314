import { createServer, type IncomingMessage, type Server, type ServerResponse } from 'node:http';
import { afterEach, describe, expect, test } from 'vitest';
import { autoHeaders, unsubscribeHeaders } from '@/lib/mail/headers';
import { sendMail, type Mail } from '@/lib/mail/send-mail';

interface Seen {
  url?: string;
  headers: IncomingMessage['headers'];
  body: unknown;
}

const open: Server[] = [];
afterEach(() => {
  for (const server of open.splice(0)) {
    server.closeAllConnections();
    server.close();
  }
});

/** A provider that answers every request with `answer` and keeps what it was sent. */
async function provider(answer: (res: ServerResponse) => void) {
  const seen: Seen[] = [];
  const server = createServer((req, res) => {
    const chunks: Buffer[] = [];
    req.on('data', (chunk: Buffer) => chunks.push(chunk));
    req.on('end', () => {
      seen.push({ url: req.url, headers: req.headers, body: JSON.parse(Buffer.concat(chunks).toString()) });
      answer(res);
    });
  });
  open.push(server);
  await new Promise<void>((ready) => server.listen(0, '127.0.0.1', ready));
  const address = server.address();
  if (address === null || typeof address === 'string') throw new Error('no port');
  return { seen, config: { apiKey: 're_test', baseUrl: `http://127.0.0.1:${address.port}/mail` } };
}

const json =
  (status: number, body: unknown, headers: Record<string, string> = {}) =>
  (res: ServerResponse) =>
    res.writeHead(status, { 'content-type': 'application/json', ...headers }).end(JSON.stringify(body));

const mail: Mail = {
  from: 'Quillhaven Guitar Works <diary@example.com>',
  to: 'maren@example.com',
  subject: 'Two new pages in the diary of your Nightjar baritone',
  html: '<p>Colour is on.</p>',
  text: 'Colour is on.',
  headers: { ...unsubscribeHeaders('https://diary.example.com/u/abc'), ...autoHeaders() },
  replyTo: 'ruth@example.com',
  idempotencyKey: 'digest/42',
};

describe('a mail that is taken', () => {
  test('goes out whole, under its key, and gives back the provider id', async () => {
    const { seen, config } = await provider(json(200, { id: 'mail_1' }));
    const photo = Buffer.from([0xff, 0xd8, 0xff, 0xe0]);
    const attachments = [{ filename: 'photo.jpg', content: photo, contentType: 'image/jpeg', contentId: 'photo-1' }];
    expect(await sendMail({ ...mail, attachments }, config)).toEqual({ outcome: 'sent', id: 'mail_1' });

    expect(seen).toHaveLength(1);
    expect(seen[0]?.url).toBe('/mail/emails');
    expect(seen[0]?.headers).toMatchObject({ authorization: 'Bearer re_test', 'idempotency-key': 'digest/42' });
    expect(seen[0]?.body).toEqual({
      from: mail.from,
      to: mail.to,
      subject: mail.subject,
      html: mail.html,
      text: mail.text,
      reply_to: 'ruth@example.com',
      headers: {
        'List-Unsubscribe': '<https://diary.example.com/u/abc>',
        'List-Unsubscribe-Post': 'List-Unsubscribe=One-Click',
        'Auto-Submitted': 'auto-generated',
        'X-Auto-Response-Suppress': 'OOF, AutoReply',
      },
      attachments: [{ filename: 'photo.jpg', content: '/9j/4A==', content_type: 'image/jpeg', content_id: 'photo-1' }],
    });
  });

  test('sends the same bytes when it is sent again', async () => {
    const { seen, config } = await provider(
      json(500, { statusCode: 500, name: 'internal_server_error', message: 'x' }),
    );
    await sendMail(mail, config);
    await sendMail(mail, config);
    expect(seen[1]?.body).toEqual(seen[0]?.body);
    expect(seen[1]?.headers['idempotency-key']).toBe(seen[0]?.headers['idempotency-key']);
  });
});

describe('a mail whose fate is open is tried again', () => {
  test.each([
    { what: 'a connection cut after the request', answer: (res: ServerResponse) => res.destroy() },
    { what: 'a broken 200', answer: (res: ServerResponse) => res.writeHead(200).end('{"id":') },
    { what: 'a 200 without an id', answer: json(200, {}) },
    { what: 'a 500', answer: json(500, { statusCode: 500, name: 'internal_server_error', message: 'x' }) },
    { what: 'a page from a gateway', answer: (res: ServerResponse) => res.writeHead(502).end('<html>Bad gateway') },
    { what: 'JSON of another shape', answer: json(503, { oops: true }) },
    { what: 'JSON null', answer: json(503, null) },
    {
      what: 'the same key at work elsewhere',
      answer: json(409, { statusCode: 409, name: 'concurrent_idempotent_requests', message: 'x' }),
    },
  ])('after $what', async ({ answer }) => {
    const { config } = await provider(answer);
    expect(await sendMail(mail, config)).toMatchObject({ outcome: 'retry', unknown: true });
  });

  test('after the provider has stayed silent too long', async () => {
    const { config } = await provider(() => undefined);
    const startedMs = performance.now();
    expect(await sendMail(mail, config, 100)).toMatchObject({ outcome: 'retry', unknown: true });
    expect(performance.now() - startedMs).toBeLessThan(5_000);
  });

  test('after nobody was there', async () => {
    const { config } = await provider(() => undefined);
    await new Promise((closed) => open.splice(0)[0]?.close(closed));
    expect(await sendMail(mail, config)).toMatchObject({ outcome: 'retry', unknown: true });
  });
});

describe('a mail that came too fast', () => {
  const tooMany = { statusCode: 429, name: 'rate_limit_exceeded', message: 'slow down' };

  test('waits as long as the provider asks and was surely not sent', async () => {
    const { config } = await provider(json(429, tooMany, { 'retry-after': '7' }));
    expect(await sendMail(mail, config)).toEqual({
      outcome: 'retry',
      reason: '429 rate_limit_exceeded: slow down',
      retryAfterMs: 7_000,
      unknown: false,
    });
  });

  test('has no wait of its own when the provider names none it can read', async () => {
    const { config } = await provider(json(429, tooMany, { 'retry-after': 'soon' }));
    expect(await sendMail(mail, config)).not.toHaveProperty('retryAfterMs');
  });
});

describe('a mail the provider will never take is refused for good', () => {
  test.each([
    { status: 400, name: 'validation_error' },
    { status: 401, name: 'missing_api_key' },
    { status: 403, name: 'invalid_api_key' },
    { status: 409, name: 'invalid_idempotent_request' },
    { status: 422, name: 'invalid_from_address' },
  ])('$status $name', async ({ status, name }) => {
    const { config } = await provider(json(status, { statusCode: status, name, message: 'no' }));
    expect(await sendMail(mail, config)).toEqual({ outcome: 'refused', reason: `${status} ${name}: no` });
  });
});

describe('a mail with a second line in a header never leaves', () => {
  const evil = 'x\r\nBcc: everyone@example.com';

  test.each<{ where: string; change: Partial<Mail> }>([
    { where: 'subject', change: { subject: evil } },
    { where: 'from', change: { from: evil } },
    { where: 'to', change: { to: evil } },
    { where: 'reply-to', change: { replyTo: evil } },
    { where: 'header value', change: { headers: { 'X-Order': evil } } },
    { where: 'header name', change: { headers: { [evil]: 'x' } } },
    {
      where: 'file name',
      change: { attachments: [{ filename: evil, content: Buffer.from('x'), contentType: 'image/jpeg' }] },
    },
    { where: 'key', change: { idempotencyKey: evil } },
    { where: 'key that is empty', change: { idempotencyKey: '' } },
    { where: 'key of 257 characters', change: { idempotencyKey: 'k'.repeat(257) } },
  ])('in its $where', async ({ change }) => {
    const { seen, config } = await provider(json(200, { id: 'mail_1' }));
    expect(await sendMail({ ...mail, ...change }, config)).toMatchObject({ outcome: 'refused' });
    expect(seen).toEqual([]);
  });
});
