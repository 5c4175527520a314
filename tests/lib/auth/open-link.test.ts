import { createRequire } from 'node:module';
import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, test, vi } from 'vitest';
import { POST } from '@/app/api/auth/[...nextauth]/route';
import { db } from '@/db/client';
import { findSessionViewer } from '@/db/queries/sessions';
import { askForLink } from '@/db/queries/sign-in';
import { sessions } from '@/db/schema';
import { newCode, newToken } from '@/lib/auth/secrets';
import { openTestDatabase } from '../../support/database';
import { makePerson, makeSession, type Person } from '../../support/world';

const cookieJar = vi.hoisted(() => new Map<string, string>());
const inRequest = vi.hoisted(() => ({
  cookies: async () => ({
    get: (name: string) => (cookieJar.has(name) ? { name, value: cookieJar.get(name) } : undefined),
    getAll: () => [...cookieJar].map(([name, value]) => ({ name, value })),
  }),
  headers: async () => new Headers(),
}));
vi.mock('next/headers', () => inRequest);
// next-auth requires the same module by itself, past what vitest replaces.
Object.assign(createRequire(import.meta.url)('next/headers'), inRequest);

process.env.PEER_ADDRESS_HEADER = 'x-real-ip';
await openTestDatabase();

const ORIGIN = 'https://diary.example';
const SESSION = '__Host-flitchbook-session';
const ASKING = '__Host-flitchbook-asking-browser';
beforeEach(() => cookieJar.clear());

let peers = 0;

async function ask(person: Person) {
  const link = { token: newToken(), code: newCode(), browser: newToken(), peer: person.id, address: person.email };
  await askForLink({ ...link, nowMs: Date.now() });
  return link;
}

async function send(door: string, body: unknown, headers: Record<string, string> = { origin: ORIGIN }) {
  const sent = new Request(`${ORIGIN}/api/auth/${door}`, {
    method: 'POST',
    headers: { 'content-type': 'application/json', 'x-real-ip': `192.0.2.${(peers += 1)}`, ...headers },
    body: JSON.stringify(body),
  });
  return POST(sent, { params: Promise.resolve({ nextauth: door.split('/') }) });
}

const openLink = (body: unknown, headers?: Record<string, string>) => send('callback/email', body, headers);
const sessionsOf = (person: Person) => db().select().from(sessions).where(eq(sessions.userId, person.id));

function tokenIn(answer: Response): string {
  const line = answer.headers.getSetCookie().find((cookie) => cookie.startsWith(`${SESSION}=`)) ?? '';
  return /=([^;]+)/.exec(line)?.[1] ?? '';
}

describe('opening a sign-in link', () => {
  test('in the browser that asked starts one session, in a cookie no page can read', async () => {
    const person = await makePerson('rep');
    const { token, browser } = await ask(person);
    cookieJar.set(ASKING, browser);
    const answer = await openLink({ token });
    expect(answer.status).toBe(200);
    const [line = ''] = answer.headers.getSetCookie();
    for (const part of ['HttpOnly', 'Secure', 'Path=/', /SameSite=lax/i]) expect(line).toMatch(part);
    expect(line).not.toMatch(/Domain/i);
    expect(answer.headers.getSetCookie()).toHaveLength(1);
    expect(await findSessionViewer(tokenIn(answer), Date.now())).toMatchObject({ id: person.id, role: 'rep' });
    expect(await sessionsOf(person)).toHaveLength(1);
  });

  test('20 times at once starts one session', async () => {
    const person = await makePerson('buyer');
    const { token, browser } = await ask(person);
    cookieJar.set(ASKING, browser);
    const answers = await Promise.all(Array.from({ length: 20 }, () => openLink({ token })));
    expect(answers.filter(({ status }) => status === 200)).toHaveLength(1);
    expect(await sessionsOf(person)).toHaveLength(1);
  });

  test('with the code works in the browser that asked', async () => {
    const person = await makePerson('buyer');
    const { code, browser } = await ask(person);
    cookieJar.set(ASKING, browser);
    expect((await openLink({ code })).status).toBe(200);
  });

  test('gives the browser’s session a new token and ends the old one', async () => {
    const person = await makePerson('buyer');
    const old = await makeSession(person.id);
    const { token, browser } = await ask(person);
    cookieJar.set(ASKING, browser).set(SESSION, old);
    const answer = await openLink({ token });
    expect(tokenIn(answer)).not.toBe(old);
    expect(await findSessionViewer(old, Date.now())).toBeNull();
    expect(await sessionsOf(person)).toHaveLength(1);
  });

  test.each<{ what: string; cookie: boolean; headers: Record<string, string> }>([
    { what: 'without the asking browser’s cookie', cookie: false, headers: { origin: ORIGIN } },
    { what: 'from another site', cookie: true, headers: { origin: 'https://other.example' } },
    { what: 'with no origin at all', cookie: true, headers: {} },
  ])('$what starts no session, and the link stays good', async ({ cookie, headers }) => {
    const person = await makePerson('buyer');
    const { token, browser } = await ask(person);
    if (cookie) cookieJar.set(ASKING, browser);
    const answer = await openLink({ token }, headers);
    expect(answer.status).toBe(403);
    expect(answer.headers.getSetCookie()).toEqual([]);
    expect(await sessionsOf(person)).toEqual([]);
    cookieJar.set(ASKING, browser);
    expect((await openLink({ token })).status).toBe(200);
  });

  test.each([null, {}, [], { token: '' }, { code: '12345' }, { code: '1234567' }, { token: 'x'.repeat(5000) }, 'text'])(
    'with %j is refused with a sentence',
    async (body) => {
      const answer = await openLink(body);
      expect(answer.status).toBe(403);
      expect(await answer.json()).toMatchObject({ message: expect.stringMatching(/\.$/) });
    },
  );

  test('of an account closed since it was asked for starts no session', async () => {
    const person = await makePerson('buyer', { disabledAt: 1 });
    const { token, browser } = await ask(person);
    cookieJar.set(ASKING, browser);
    expect((await openLink({ token })).status).toBe(403);
    expect(await sessionsOf(person)).toEqual([]);
  });
});

test.each(['signin/email', 'session', 'csrf', 'providers', 'callback/other', 'error', '_log', 'callback/email/x'])(
  'next-auth’s own door %s is closed',
  async (door) => {
    const answer = await send(door, {});
    expect(answer.status).toBe(404);
    expect(answer.headers.getSetCookie()).toEqual([]);
  },
);

describe('signing out', () => {
  test('ends the session at once and makes the browser forget', async () => {
    const person = await makePerson('buyer');
    const token = await makeSession(person.id);
    cookieJar.set(SESSION, token);
    const answer = await send('signout', {});
    expect(answer.status).toBe(303);
    expect(answer.headers.get('clear-site-data')).toContain('"cache"');
    expect(answer.headers.getSetCookie().join()).toMatch(/Max-Age=0/);
    expect(await findSessionViewer(token, Date.now())).toBeNull();
  });

  test('is not done for another site', async () => {
    const token = await makeSession((await makePerson('buyer')).id);
    cookieJar.set(SESSION, token);
    expect((await send('signout', {}, { origin: 'https://other.example' })).status).toBe(403);
    expect(await findSessionViewer(token, Date.now())).not.toBeNull();
  });
});
