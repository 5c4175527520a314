import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, test } from 'vitest';
import { db, write } from '@/db/client';
import { countMails, listMails } from '@/db/queries/mail-watch';
import { beginTries, claimMails, queueMail, retryMail } from '@/db/queries/outbox';
import { askForLink } from '@/db/queries/sign-in';
import { askQuestion, writeLetter } from '@/db/queries/questions';
import { outbox, shop } from '@/db/schema';
import { newId } from '@/db/schema/columns';
import { newCode, newToken } from '@/lib/auth/secrets';
import { OutOfReach } from '@/lib/errors';
import { findMailReader } from '@/db/queries/mail-content';
import { composeMail } from '@/lib/jobs/compose-mail';
import { sendDueMail } from '@/lib/jobs/outbox';
import { MAIL_ATTEMPTS } from '@/lib/mail/retry-delay';
import { CORRECTABLE_MS } from '@/lib/questions/thread-rules';
import { DAY_MS, makeBuild, makePerson, noteOf, NOW_MS, type Person } from '../../support/world';
import { clock, openStandIns } from './stand-ins';

const { mailsTo, failMail, behave } = await openStandIns();

beforeEach(async () => {
  await behave();
  await write((tx) => tx.delete(outbox));
  clock.nowMs = NOW_MS;
});

const HOUR_MS = 3_600_000;
const send = () => sendDueMail('sender', clock.now);
const rowsOf = (person: Person) => db().select().from(outbox).where(eq(outbox.userId, person.id));

async function rowOf(person: Person) {
  const [row, ...others] = await rowsOf(person);
  if (!row || others.length > 0) throw new Error('not one mail');
  return row;
}

/** Somebody invited, with the mail about it waiting. */
async function invite(): Promise<Person> {
  const person = await makePerson('buyer');
  const mail = { kind: 'invitation', userId: person.id, about: {}, dedupeKey: `invitation/${newId()}` } as const;
  await write((tx) => queueMail(tx, mail, clock.nowMs));
  return person;
}

/** Sends again and again, each time when the mail says that it is due, until it is over. */
async function sendUntilOver(person: Person): Promise<void> {
  for (;;) {
    await send();
    const { state, nextAttemptAt } = await rowOf(person);
    if (state !== 'waiting') return;
    clock.nowMs = nextAttemptAt;
  }
}

describe('a mail', () => {
  test('queued twice under one key is one mail', async () => {
    const person = await makePerson('buyer');
    const mail = { kind: 'invitation', userId: person.id, about: {}, dedupeKey: `invitation/${person.id}` } as const;
    for (let n = 0; n < 3; n++) await write((tx) => queueMail(tx, mail, NOW_MS));
    await send();
    expect(await mailsTo(person)).toHaveLength(1);
  });

  test('is not there when what it tells of was undone', async () => {
    const person = await makePerson('buyer');
    const undone = write(async (tx) => {
      await queueMail(tx, { kind: 'invitation', userId: person.id, about: {}, dedupeKey: newId() }, NOW_MS);
      throw new Error('undone');
    });
    await expect(undone).rejects.toThrow('undone');
    await send();
    expect(await mailsTo(person)).toEqual([]);
  });

  test('looked for by two workers at once goes out once', async () => {
    const people = [await invite(), await invite(), await invite(), await invite()];
    await Promise.all(['one', 'two', 'three'].map((worker) => sendDueMail(worker, clock.now)));
    for (const person of people) expect(await mailsTo(person)).toHaveLength(1);
  });

  test('to a closed account is dropped', async () => {
    const person = await makePerson('buyer', { disabledAt: 1 });
    await write((tx) =>
      queueMail(tx, { kind: 'invitation', userId: person.id, about: {}, dedupeKey: newId() }, NOW_MS),
    );
    await send();
    expect(await mailsTo(person)).toEqual([]);
    expect(await rowOf(person)).toMatchObject({ state: 'dropped', frozen: null });
  });
});

// SECURITY.md P22: the same key and the same bytes at every try.
describe('a provider that', () => {
  test.each([
    { does: 'asks to slow down', fault: { status: 429, times: 1 } },
    { does: 'breaks', fault: { status: 500, times: 3 } },
    { does: 'cuts the connection', fault: { status: 0, times: 2 } },
    { does: 'takes the mail and then cuts the connection', fault: { status: 0, times: 1, afterAccepting: true } },
    {
      does: 'takes the mail and then answers 500, three times',
      fault: { status: 500, times: 3, afterAccepting: true },
    },
  ])('$does gets the mail into the box exactly once', async ({ fault }) => {
    const person = await invite();
    await failMail(fault);
    await send();
    const first = await rowOf(person);
    expect(first).toMatchObject({ state: 'waiting', attempts: 1 });
    expect(first.nextAttemptAt).toBeGreaterThanOrEqual(NOW_MS + 48_000);
    await sendUntilOver(person);
    expect(await rowOf(person)).toMatchObject({ state: 'sent', attempts: fault.times + 1, frozen: first.frozen });
    const mails = await mailsTo(person);
    expect(mails.map(({ idempotencyKey, html }) => [idempotencyKey, html])).toEqual([
      [first.dedupeKey, first.frozen?.html],
    ]);
  });

  test('says when to come back is not asked before', async () => {
    const person = await invite();
    await failMail({ status: 429, times: 1, retryAfterSeconds: 1800 });
    await send();
    expect((await rowOf(person)).nextAttemptAt).toBe(NOW_MS + 1_800_000);
    clock.nowMs += 1_799_999;
    expect(await send()).toBe(0);
  });

  test('refuses for good is not asked again, and an admin reads why', async () => {
    const person = await invite();
    await failMail({ status: 422, times: 1 });
    await send();
    expect(await rowOf(person)).toMatchObject({ state: 'failed', attempts: 1 });
    clock.nowMs += DAY_MS;
    expect(await send()).toBe(0);
    const admin = await makePerson('admin');
    const troubled = await listMails(admin, 'trouble');
    expect(troubled).toMatchObject([{ kind: 'invitation', state: 'failed', person: person.name }]);
    expect(troubled[0]?.problem).toContain('422');
    expect(await countMails(admin)).toContainEqual({ state: 'failed', n: 1 });
    expect(JSON.stringify(troubled)).not.toContain(person.email);
  });

  test('never gets well is given up after eight tries within a day, visibly', async () => {
    const person = await invite();
    await failMail({ status: 500, times: 1000 });
    await sendUntilOver(person);
    expect(MAIL_ATTEMPTS).toBe(8);
    expect(await rowOf(person)).toMatchObject({ state: 'failed', attempts: 8 });
    expect((await rowOf(person)).lastProblem).toMatch(/^given up: 500/);
    expect(clock.nowMs - NOW_MS).toBeLessThan(DAY_MS);
    const troubled = await listMails(await makePerson('admin'), 'trouble');
    expect(troubled.map(({ state }) => state)).toEqual(['failed']);
  });

  test('left it open for 25 hours whether it took the mail is not asked again: the mail is parked for an admin', async () => {
    const person = await invite();
    await failMail({ status: 0, times: 1, afterAccepting: true });
    await send();
    clock.nowMs = NOW_MS + 25 * HOUR_MS;
    await send();
    expect(await rowOf(person)).toMatchObject({ state: 'parked' });
    expect(await mailsTo(person)).toHaveLength(1);
    clock.nowMs += DAY_MS;
    expect(await send()).toBe(0);
    const troubled = await listMails(await makePerson('admin'), 'trouble');
    expect(troubled.map(({ state }) => state)).toEqual(['parked']);
  });
});

describe('an admin who tries a failed mail again', () => {
  test('sends the same bytes under the same key; what had arrived after all does not come twice', async () => {
    const [admin, person] = [await makePerson('admin'), await invite()];
    await failMail({ status: 500, times: 8, afterAccepting: true });
    await sendUntilOver(person);
    const failed = await rowOf(person);
    expect(failed.state).toBe('failed');
    await retryMail(admin, failed.id, clock.nowMs);
    await send();
    expect(await rowOf(person)).toMatchObject({ state: 'sent', frozen: failed.frozen });
    expect(await mailsTo(person)).toHaveLength(1);
  });

  test('more than a day after its first try has it parked, not perhaps delivered twice', async () => {
    const [admin, person] = [await makePerson('admin'), await invite()];
    await failMail({ status: 500, times: 8, afterAccepting: true });
    await sendUntilOver(person);
    clock.nowMs += DAY_MS;
    await retryMail(admin, (await rowOf(person)).id, clock.nowMs);
    await send();
    expect(await rowOf(person)).toMatchObject({ state: 'parked' });
    expect(await mailsTo(person)).toHaveLength(1);
    await expect(retryMail(admin, (await rowOf(person)).id, clock.nowMs)).rejects.toMatchObject({ code: 'conflict' });
  });

  test('cannot do so with a mail that is on its way or sent, and nobody else can at all', async () => {
    const [admin, person] = [await makePerson('admin'), await invite()];
    const { id } = await rowOf(person);
    await expect(retryMail(admin, id, clock.nowMs)).rejects.toMatchObject({ code: 'conflict' });
    await send();
    await expect(retryMail(admin, id, clock.nowMs)).rejects.toMatchObject({ code: 'conflict' });
    await expect(retryMail(await makePerson('rep'), id, clock.nowMs)).rejects.toThrow(OutOfReach);
    expect(await mailsTo(person)).toHaveLength(1);
  });
});

describe('a sender that dies', () => {
  test('after claiming, before sending: the next one sends when the lease is over, not before', async () => {
    const person = await invite();
    expect(await claimMails('dead', clock.nowMs, 60_000, 1)).toMatchObject([{ userId: person.id }]);
    expect(await send()).toBe(0);
    clock.nowMs += 60_001;
    await send();
    expect(await mailsTo(person)).toHaveLength(1);
    expect(await rowOf(person)).toMatchObject({ state: 'sent', attempts: 1 });
  });

  test('between sending and writing that down: the next one sends the same bytes, and the box has one mail', async () => {
    const person = await invite();
    await failMail({ status: 0, times: 1, afterAccepting: true });
    await send();
    await write((tx) =>
      tx.update(outbox).set({ state: 'sending', leaseOwner: 'dead', leaseEndsAt: clock.nowMs + 60_000 }),
    );
    clock.nowMs += 60_001;
    await send();
    expect(await rowOf(person)).toMatchObject({ state: 'sent' });
    expect(await mailsTo(person)).toHaveLength(1);
  });

  test('and comes back after its lease cannot freeze or settle what another has taken', async () => {
    const person = await invite();
    const [claimed] = await claimMails('slow', clock.nowMs, 60_000, 1);
    const reader = await findMailReader(person.id);
    const frozen = claimed && reader && (await composeMail(claimed, reader, clock.nowMs));
    if (!claimed || !frozen) throw new Error('nothing to send');
    clock.nowMs += 60_001;
    await send();
    const late = { mail: claimed, frozen: { ...frozen, subject: 'Another one' } };
    expect(await beginTries('slow', [late], clock.nowMs)).toEqual(new Set());
    expect((await rowOf(person)).frozen?.subject).not.toBe('Another one');
  });
});

test('bytes that no longer say what holds are dropped, and the mail goes out as it reads now, once', async () => {
  const person = await invite();
  await failMail({ status: 429, times: 1 });
  await send();
  await write((tx) => tx.update(shop).set({ name: 'Quillhaven & Daughters' }));
  clock.nowMs += HOUR_MS;
  await send();
  await write((tx) => tx.update(shop).set({ name: 'Quillhaven Guitar Works' }));
  expect((await rowsOf(person)).map(({ state }) => state).sort()).toEqual(['dropped', 'sent']);
  expect((await mailsTo(person)).map(({ text }) => text.includes('Quillhaven & Daughters'))).toEqual([true]);
});

describe('the secrets of a sign-in mail', () => {
  async function ask() {
    const person = await makePerson('buyer');
    const link = { token: newToken(), code: newCode(), browser: newToken(), peer: person.id, address: person.email };
    await askForLink({ ...link, nowMs: clock.nowMs });
    return { person, ...link };
  }
  const isKept = async (token: string) => JSON.stringify(await db().select().from(outbox)).includes(token);

  test('are in the mail, and gone from the database once it is sent', async () => {
    const { person, token, code } = await ask();
    expect(await isKept(token)).toBe(true);
    await send();
    const [mail] = await mailsTo(person);
    expect(mail?.text).toContain(`https://diary.example/sign-in/open#${token}`);
    expect(mail?.text).toContain(code);
    expect(await isKept(token)).toBe(false);
  });

  test.each([
    { when: 'the provider refused it', fault: { status: 422, times: 1 } },
    { when: 'the link died before it could be sent', fault: { status: 500, times: 1000 } },
  ])('are gone as well when $when', async ({ fault }) => {
    const { person, token } = await ask();
    await failMail(fault);
    await sendUntilOver(person);
    expect(await isKept(token)).toBe(false);
    expect(clock.nowMs - NOW_MS).toBeLessThan(HOUR_MS);
  });

  test('are gone from a mail that was replaced by a newer one', async () => {
    const { person, token } = await ask();
    await failMail({ status: 429, times: 1 });
    await send();
    await write((tx) => tx.update(shop).set({ name: 'Quillhaven & Daughters' }));
    clock.nowMs += 120_000;
    await send();
    await write((tx) => tx.update(shop).set({ name: 'Quillhaven Guitar Works' }));
    expect(await mailsTo(person)).toHaveLength(1);
    expect(await isKept(token)).toBe(false);
  });

  test('of an older link are never mailed once a newer one was asked for', async () => {
    const older = await ask();
    const newer = { ...older, token: newToken(), code: newCode() };
    await askForLink({ ...newer, nowMs: clock.nowMs + 1 });
    clock.nowMs += 2;
    await send();
    const mails = await mailsTo(older.person);
    expect(mails.map(({ text }) => [text.includes(older.token), text.includes(newer.token)])).toEqual([[false, true]]);
  });
});

describe('mail about a question', () => {
  async function openQuestion(heldUntilAt?: number) {
    const [owner, builder] = [await makePerson('buyer'), await makePerson('builder', { department: 'neck' })];
    const build = await makeBuild({
      owner,
      staff: [{ person: builder, cleared: true }],
      heldUntilAt,
      instrument: 'Lantern',
    });
    const question = { entryId: null, topicId: 'neck-work', subject: 'Fret wire', idempotencyKey: newId() };
    const asked = { orderNumber: build.orderNumber, note: noteOf('Which wire is it, exactly?'), ...question };
    const { id } = await askQuestion(owner, asked, clock.nowMs);
    return { owner, builder, build, id };
  }

  /** When nothing that was written before can be corrected any more. */
  async function sendAll() {
    clock.nowMs += CORRECTABLE_MS;
    await send();
  }

  test('goes to who holds the pen, and the answer to who asked, each once', async () => {
    const { owner, builder, id } = await openQuestion();
    await send();
    expect(await mailsTo(builder)).toEqual([]);
    await sendAll();
    expect((await mailsTo(builder)).map(({ text }) => text.includes('Which wire is it'))).toEqual([true]);
    const answer = { note: noteOf('The narrow, tall one.'), idempotencyKey: newId() };
    await Promise.all([1, 2, 3].map((n) => writeLetter(builder, id, answer, clock.nowMs + n)));
    clock.nowMs += 10;
    await sendAll();
    expect((await mailsTo(owner)).map(({ text }) => text.includes('The narrow, tall one.'))).toEqual([true]);
  });

  test('on a build held from view names no instrument and quotes nothing', async () => {
    const { owner, builder, build, id } = await openQuestion(Date.now() + 90 * DAY_MS);
    await writeLetter(builder, id, { note: noteOf('The narrow, tall one.'), idempotencyKey: newId() }, clock.nowMs);
    await sendAll();
    const [toBuilder, toOwner] = [await mailsTo(builder), await mailsTo(owner)];
    expect([toBuilder.length, toOwner.length]).toEqual([1, 1]);
    const everything = JSON.stringify([toBuilder, toOwner]);
    for (const secret of ['Which wire', 'narrow', 'Fret wire', build.instrument])
      expect(everything).not.toContain(secret);
    expect(JSON.stringify(toOwner)).not.toContain(build.orderNumber);
  });
});
