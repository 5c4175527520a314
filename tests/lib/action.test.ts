import { beforeEach, describe, expect, test, vi } from 'vitest';
import { z } from 'zod';
import { action, openAction } from '@/lib/action';
import { Denied, OutOfReach } from '@/lib/errors';
import { fresh } from '@/lib/form-state';
import { limits } from '@/lib/rate-limits';
import { openTestDatabase } from '../support/database';
import { makePerson, makeSession } from '../support/world';

const request = vi.hoisted(() => ({ cookie: '', headers: new Headers() }));
vi.mock('next/headers', () => ({
  cookies: async () => ({ get: () => ({ value: request.cookie }) }),
  headers: async () => request.headers,
}));
vi.mock('next/server', () => ({ after: () => undefined }));

await openTestDatabase();

const schema = z.object({ name: z.string().min(1, 'Write the name.'), note: z.string() });

beforeEach(async () => {
  request.cookie = await makeSession((await makePerson('buyer')).id);
  request.headers = new Headers({ origin: 'https://diary.example' });
});

function formOf(values: Record<string, string>): FormData {
  const form = new FormData();
  for (const [name, value] of Object.entries(values)) form.set(name, value);
  return form;
}

const typed = { name: 'Tove', note: 'Typed at length.' };
const send = (run: Parameters<typeof action<typeof schema>>[1], values: Record<string, string> = typed) =>
  action(schema, run)(fresh, formOf(values));

describe('a form’s door', () => {
  test('does its work and says what happened', async () => {
    expect(await send(async (_viewer, { name }) => `Saved ${name}.`)).toEqual({
      state: 'done',
      message: 'Saved Tove.',
    });
  });

  test.each<{ from: string; headers: Record<string, string> }>([
    { from: 'another site', headers: { origin: 'https://other.example' } },
    {
      from: 'another site with a forwarded host to match',
      headers: { origin: 'https://other.example', 'x-forwarded-host': 'other.example' },
    },
    { from: 'nowhere that it would tell', headers: {} },
    { from: 'a sandboxed frame', headers: { origin: 'null' } },
    {
      from: 'another site, by fetch metadata',
      headers: { origin: 'https://diary.example', 'sec-fetch-site': 'cross-site' },
    },
  ])('refuses what comes from $from, and does nothing', async ({ headers }) => {
    request.headers = new Headers(headers);
    let done = 0;
    const answer = await send(async () => void (done += 1));
    expect(answer).toMatchObject({ state: 'refused', values: typed });
    const open = openAction(schema, async () => void (done += 1));
    expect(await open(fresh, formOf(typed))).toMatchObject({ state: 'refused' });
    expect(done).toBe(0);
  });

  test('refuses whoever is signed out, and keeps what they typed', async () => {
    request.cookie = '';
    expect(await send(async () => 'Saved.')).toMatchObject({ state: 'refused', values: typed, fields: {} });
  });

  test('answers bad input with a sentence at its field, and keeps what was typed', async () => {
    const values = { ...typed, name: '' };
    expect(await send(async () => 'Saved.', values)).toMatchObject({
      state: 'refused',
      fields: { name: 'Write the name.' },
      values,
    });
  });

  test('gives back nothing that the form’s own machinery put in', async () => {
    const answer = await send(async () => 'Saved.', { name: '', note: '', $ACTION_ID_1: 'x' });
    expect(answer).toMatchObject({ values: { name: '', note: '' } });
    expect(JSON.stringify(answer)).not.toContain('ACTION');
  });

  test.each([
    { error: new Denied('conflict', 'Saved by another.'), message: 'Saved by another.' },
    { error: new OutOfReach('Q-2417'), message: 'There is nothing here for you.' },
    {
      error: new Error('SQLITE_CORRUPT at /var/diary.db'),
      message: 'Something broke on our side. It has been written down; please try again.',
    },
  ])('tells of a refusal or a fault only what is for the reader: $message', async ({ error, message }) => {
    expect(await send(() => Promise.reject(error))).toEqual({ state: 'refused', message, fields: {}, values: typed });
  });

  test('lets a redirect pass', async () => {
    const redirect = Object.assign(new Error('NEXT_REDIRECT'), { digest: 'NEXT_REDIRECT;replace;/sign-in;307;' });
    await expect(send(() => Promise.reject(redirect))).rejects.toBe(redirect);
  });

  test('refuses the one too many with a sentence that says when to come back', async () => {
    const ask = action(schema, async () => 'Sent.', 'question');
    for (let n = 0; n < limits.question.capacity; n++) expect((await ask(fresh, formOf(typed))).state).toBe('done');
    expect(await ask(fresh, formOf(typed))).toMatchObject({
      state: 'refused',
      message: expect.stringMatching(/again in \d/),
    });
  });
});
