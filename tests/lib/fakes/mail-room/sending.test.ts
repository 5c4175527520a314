import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { Resend } from 'resend';
import { mailTo, startTestRoom, type TestMail } from './fixture';

let now_ms = Date.UTC(2026, 11, 1, 9);
let room: Awaited<ReturnType<typeof startTestRoom>>;
beforeAll(async () => {
  room = await startTestRoom(() => now_ms);
});
afterAll(() => room.stop());

describe('a mail', () => {
  test('arrives with headers and attachments as they were sent', async () => {
    const headers = { 'List-Unsubscribe': '<https://diary.example/leave/x>', 'X-Entity-Ref-ID': '7' };
    const attachments = [{ filename: 'spec.txt', content: Buffer.from('scale 25.5 in'), contentType: 'text/plain' }];
    const { data } = await room.resend().emails.send(mailTo('ada@player.example', { headers, attachments }));
    const [mail] = await room.mails('Ada@Player.example');
    expect(mail).toMatchObject({
      id: data?.id,
      from: 'Quillhaven <diary@quillhaven.example>',
      to: ['ada@player.example'],
      subject: 'Your top is glued',
      headers,
      attachments: [{ filename: 'spec.txt', contentType: 'text/plain', sizeBytes: 13 }],
      createdAt: '2026-12-01T09:00:00.000Z',
      idempotencyKey: null,
    });
    expect(await room.page(`/mail/${mail?.id}/attachments/0`)).toBe('scale 25.5 in');
  });

  test('survives a restart, and the newest stands first', async () => {
    for (const subject of ['first', 'second']) {
      await room.resend().emails.send(mailTo('keep@player.example', { subject }));
      now_ms += 1_000;
    }
    await room.restart();
    expect((await room.mails('keep@player.example')).map(({ subject }) => subject)).toEqual(['second', 'first']);
  });

  test.each<{ wrong: string; change: Record<string, unknown>; name: string }>([
    { wrong: 'no sender', change: { from: undefined }, name: 'missing_required_field' },
    { wrong: 'no receiver', change: { to: undefined }, name: 'missing_required_field' },
    { wrong: 'an empty list of receivers', change: { to: [] }, name: 'missing_required_field' },
    { wrong: 'no subject', change: { subject: undefined }, name: 'missing_required_field' },
    { wrong: 'neither text nor HTML', change: { text: undefined, html: undefined }, name: 'missing_required_field' },
    { wrong: 'a sender that is no address', change: { from: 'Quillhaven' }, name: 'invalid_from_address' },
    { wrong: 'a receiver that is no address', change: { to: 'ada@player' }, name: 'validation_error' },
    { wrong: 'two addresses in one', change: { to: 'a@b.example,c@d.example' }, name: 'validation_error' },
    { wrong: '51 receivers', change: { to: Array(51).fill('a@b.example') }, name: 'validation_error' },
    { wrong: 'a line break in the subject', change: { subject: 'a\r\nBcc: x@y.example' }, name: 'validation_error' },
    {
      wrong: 'a line break in a header',
      change: { headers: { 'X-A': 'b\nBcc: x@y.example' } },
      name: 'validation_error',
    },
    { wrong: 'a line break in a header name', change: { headers: { 'X-A\nBcc': 'b' } }, name: 'validation_error' },
    {
      wrong: 'an attachment that is not base64',
      change: { attachments: [{ filename: 'a', content: '%%' }] },
      name: 'invalid_attachment',
    },
  ])('with $wrong is refused as $name and not kept', async ({ change, name }) => {
    const to = 'refused@player.example';
    const { data, error } = await room.resend().post('/emails', { ...mailTo(to), ...change });
    expect(data).toBeNull();
    expect(error).toMatchObject({ statusCode: 422, name });
    expect(await room.mails(to)).toEqual([]);
  });

  test('is refused without the right key', async () => {
    const stranger = new Resend('re_other', { baseUrl: room.url });
    const { error } = await stranger.emails.send(mailTo('ada@player.example'));
    expect(error).toMatchObject({ statusCode: 403, name: 'invalid_api_key' });
    expect((await fetch(`${room.url}/emails`, { method: 'POST', body: '{}' })).status).toBe(401);
  });
});

describe('a batch', () => {
  test('gives one id for each mail, in order', async () => {
    const { data } = await room.resend().batch.send(['b1@x.example', 'b2@x.example'].map((to) => mailTo(to)));
    const found = await Promise.all(['b1@x.example', 'b2@x.example'].map((to) => room.mails(to)));
    expect(data?.data.map(({ id }) => id)).toEqual(found.map(([mail]) => mail?.id));
  });

  test('with one bad mail is refused whole', async () => {
    const { error } = await room.resend().batch.send([mailTo('whole@x.example'), mailTo('nobody')]);
    expect(error).toMatchObject({ statusCode: 422, name: 'validation_error' });
    expect(await room.mails('whole@x.example')).toEqual([]);
  });

  test.each([
    { count: 100, accepted: true },
    { count: 101, accepted: false },
  ])('of $count mails is accepted: $accepted', async ({ count, accepted }) => {
    const mails = Array.from({ length: count }, () => mailTo(`many-${count}@x.example`));
    const { error } = await room.resend().batch.send(mails);
    expect(error === null).toBe(accepted);
    expect(await room.mails(`many-${count}@x.example`)).toHaveLength(accepted ? count : 0);
  });
});

describe('an idempotency key', () => {
  const send = (to: string, idempotencyKey: string, change: Partial<TestMail> = {}) =>
    room.resend().emails.send(mailTo(to, change), { idempotencyKey });

  test('makes a repeat give the first id and no second mail, also after a restart', async () => {
    const first = await send('once@x.example', 'digest/1');
    await room.restart();
    const again = await send('once@x.example', 'digest/1');
    expect(again.data?.id).toBe(first.data?.id);
    expect(await room.mails('once@x.example')).toHaveLength(1);
  });

  test('covers a whole batch', async () => {
    const mails = [mailTo('batch-once@x.example'), mailTo('batch-once@x.example')];
    const first = await room.resend().batch.send(mails, { idempotencyKey: 'batch/1' });
    const again = await room.resend().batch.send(mails, { idempotencyKey: 'batch/1' });
    expect(again.data).toEqual(first.data);
    expect(await room.mails('batch-once@x.example')).toHaveLength(2);
  });

  test('used with another body is refused', async () => {
    await send('other@x.example', 'digest/2');
    const { error } = await send('other@x.example', 'digest/2', { subject: 'Another' });
    expect(error).toMatchObject({ statusCode: 409, name: 'invalid_idempotent_request' });
  });

  test('in flight is refused, and good again afterwards', async () => {
    await room.fail({ status: 500, times: 1, afterAccepting: true, holdMs: 400 });
    const slow = send('flight@x.example', 'digest/3');
    await expect.poll(() => room.mails('flight@x.example')).toHaveLength(1);
    const meanwhile = await send('flight@x.example', 'digest/3');
    expect(meanwhile.error).toMatchObject({ statusCode: 409, name: 'concurrent_idempotent_requests' });
    expect((await slow).error).toMatchObject({ statusCode: 500 });
    expect((await send('flight@x.example', 'digest/3')).error).toBeNull();
    expect(await room.mails('flight@x.example')).toHaveLength(1);
  });

  test('is forgotten after 24 hours', async () => {
    await send('day@x.example', 'digest/4');
    now_ms += 24 * 3_600_000 - 1;
    await send('day@x.example', 'digest/4');
    expect(await room.mails('day@x.example')).toHaveLength(1);
    now_ms += 1;
    await send('day@x.example', 'digest/4');
    expect(await room.mails('day@x.example')).toHaveLength(2);
  });

  test('of more than 256 characters is refused', async () => {
    const { error } = await send('long@x.example', 'k'.repeat(257));
    expect(error).toMatchObject({ statusCode: 400, name: 'invalid_idempotency_key' });
  });
});

describe('the fault switch', () => {
  test('answers 429 with the time to wait, as often as told, and takes nothing in', async () => {
    await room.fail({ status: 429, times: 2, retryAfterSeconds: 7 });
    const replies = [];
    for (let i = 0; i < 3; i++) replies.push(await room.resend().emails.send(mailTo('busy@x.example')));
    expect(replies.map(({ error }) => error?.statusCode ?? 200)).toEqual([429, 429, 200]);
    expect(replies[0]?.error?.name).toBe('rate_limit_exceeded');
    expect(replies[0]?.headers?.['retry-after']).toBe('7');
    expect(await room.mails('busy@x.example')).toHaveLength(1);
  });

  test('can cut the connection after taking the mail in; the same key then finds it', async () => {
    await room.fail({ status: 0, times: 1, afterAccepting: true });
    const mail = mailTo('cut@x.example');
    const lost = await room.resend().emails.send(mail, { idempotencyKey: 'cut/1' });
    expect(lost.error).toMatchObject({ statusCode: null });
    const [kept] = await room.mails('cut@x.example');
    const again = await room.resend().emails.send(mail, { idempotencyKey: 'cut/1' });
    expect(again.data?.id).toBe(kept?.id);
  });

  test('is cleared by DELETE', async () => {
    await room.fail({ status: 500, times: 5 });
    await fetch(`${room.url}/_fail`, { method: 'DELETE' });
    expect((await room.resend().emails.send(mailTo('clear@x.example'))).error).toBeNull();
  });
});
