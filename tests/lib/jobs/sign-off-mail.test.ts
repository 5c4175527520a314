import { and, eq } from 'drizzle-orm';
import { beforeEach, describe, expect, test } from 'vitest';
import { db, write } from '@/db/client';
import { askForChange, signSignOff, withdrawSignOff } from '@/db/queries/sign-off-answers';
import { queueSignOffReminders } from '@/db/queries/sign-off-reminders';
import { assignments, outbox, signOffs } from '@/db/schema';
import { sendDueMail } from '@/lib/jobs/outbox';
import { clock, openStandIns } from './stand-ins';
import { askDrawing, signOffCast } from '../../support/sign-off-world';
import { DAY_MS, makePerson, NOW_MS } from '../../support/world';

const { mailsTo, behave } = await openStandIns();
const HOUR_MS = 3_600_000;
const held = { heldUntilAt: Date.now() + 400 * DAY_MS };

beforeEach(async () => {
  await behave();
  await write((tx) => tx.delete(outbox));
  await write((tx) => tx.delete(signOffs));
  clock.nowMs = NOW_MS;
});

const send = () => sendDueMail('sender', clock.now);

const reminders = (signOffId: string) =>
  db()
    .select({ about: outbox.about })
    .from(outbox)
    .where(and(eq(outbox.kind, 'sign_off_reminder')))
    .then((rows) => rows.filter(({ about }) => about.signOffId === signOffId).length);

describe('the mail about something to sign', () => {
  test('goes to the owner, with the way to it, its day and the rep’s words', async () => {
    const { owner, companion, build, rep } = await signOffCast();
    const id = await askDrawing(build, rep);
    await send();
    const [mail, ...others] = await mailsTo(owner);
    expect(others).toEqual([]);
    expect(mail?.subject).toContain('Headstock logo, drawing 1');
    for (const words of ['12 December', 'Please look at the letters.', `/builds/${build.orderNumber}/sign-offs/${id}`])
      expect(mail?.text).toContain(words);
    expect(await mailsTo(companion)).toEqual([]);
  });

  test('of a build held from view says neither what it is of, nor whose, nor a word of it', async () => {
    const { owner, build, rep } = await signOffCast(held);
    await askDrawing(build, rep);
    await send();
    const [mail] = await mailsTo(owner);
    expect(mail?.attachments).toEqual([]);
    for (const secret of ['Headstock', 'look at the letters', build.instrument, build.orderNumber])
      expect(`${mail?.subject} ${mail?.html} ${mail?.text}`).not.toContain(secret);
  });

  test('is not sent when it was taken back, replaced or signed in between', async () => {
    const { owner, build, rep } = await signOffCast();
    const [back, replaced] = [await askDrawing(build, rep), await askDrawing(build, rep)];
    const signed = await askDrawing(build, rep);
    await withdrawSignOff(rep, back, NOW_MS);
    await askDrawing(build, rep, { replacesId: replaced, title: 'Drawing 2' });
    await signSignOff(owner, { signOffId: signed, name: owner.name }, NOW_MS);
    await send();
    expect((await mailsTo(owner)).map(({ subject }) => subject)).toEqual([expect.stringContaining('Drawing 2')]);
  });
});

describe('the answer', () => {
  test('goes to the rep who asked, with the owner’s words', async () => {
    const { owner, build, rep } = await signOffCast();
    const signOffId = await askDrawing(build, rep);
    await askForChange(owner, { signOffId, words: 'The R is too wide.' }, NOW_MS);
    await send();
    const [mail] = await mailsTo(rep);
    expect(mail?.subject).toContain('Maren Oduya asks for a change');
    expect(mail?.text).toContain('The R is too wide.');
  });

  test('goes to the reps who are there when who asked has left the build', async () => {
    const { owner, build, rep } = await signOffCast();
    const next = await makePerson('rep');
    const signOffId = await askDrawing(build, rep);
    await write(async (tx) => {
      await tx.update(assignments).set({ endedAt: NOW_MS }).where(eq(assignments.userId, rep.id));
      await tx.insert(assignments).values({ buildId: build.id, userId: next.id, startedAt: NOW_MS });
    });
    await signSignOff(owner, { signOffId, name: owner.name }, NOW_MS);
    await send();
    expect((await mailsTo(next)).map(({ subject }) => subject)).toEqual([
      'Maren Oduya signed: Headstock logo, drawing 1',
    ]);
    expect(await mailsTo(rep)).toEqual([]);
  });

  test('of a build held from view keeps the words out', async () => {
    const { owner, build, rep } = await signOffCast(held);
    const signOffId = await askDrawing(build, rep);
    await askForChange(owner, { signOffId, words: 'The R is too wide.' }, NOW_MS);
    await send();
    const [mail] = await mailsTo(rep);
    for (const secret of ['Headstock', 'too wide', build.instrument])
      expect(`${mail?.subject} ${mail?.html} ${mail?.text}`).not.toContain(secret);
  });
});

describe('the reminder', () => {
  // The shop of these tests is in Lisbon, whose clock is UTC in winter.
  const at = (day: number, hour: number) => Date.UTC(2026, 11, day, hour);

  test('goes once, two days ahead, in the shop’s morning', async () => {
    const { owner, build, rep } = await signOffCast();
    const id = await askDrawing(build, rep, { dueOn: '2026-12-12' });
    for (const [when, count] of [
      [at(9, 20), 0],
      [at(10, 7), 0],
      [at(10, 8), 1],
      [at(10, 9), 1],
      [at(12, 9), 1],
      [at(20, 9), 1],
    ] as const) {
      await queueSignOffReminders(when);
      expect(await reminders(id)).toBe(count);
    }
    clock.nowMs = at(20, 10);
    await send();
    const subjects = (await mailsTo(owner)).map(({ subject }) => subject);
    expect(subjects.filter((subject) => subject.startsWith('Still waits for you'))).toHaveLength(1);
  });

  test('goes on the day itself when it was asked for later than that', async () => {
    const { build, rep } = await signOffCast();
    const id = await askDrawing(build, rep, { dueOn: '2026-12-02' });
    await queueSignOffReminders(at(1, 12));
    expect(await reminders(id)).toBe(0);
    await queueSignOffReminders(at(2, 8) + HOUR_MS);
    expect(await reminders(id)).toBe(1);
  });

  test('is not sent for what was answered or taken back', async () => {
    const { owner, build, rep } = await signOffCast();
    const [signed, back] = [await askDrawing(build, rep), await askDrawing(build, rep)];
    await signSignOff(owner, { signOffId: signed, name: owner.name }, NOW_MS);
    await withdrawSignOff(rep, back, NOW_MS);
    await queueSignOffReminders(at(12, 9));
    expect([await reminders(signed), await reminders(back)]).toEqual([0, 0]);
  });

  test('comes to everybody though many wait that are not due yet', async () => {
    const { build, rep } = await signOffCast();
    for (let i = 0; i < 120; i += 1) await askDrawing(build, rep, { dueOn: '2026-12-01' });
    const id = await askDrawing(build, rep, { dueOn: '2026-12-03' }, at(1, 9) - 3 * DAY_MS);
    await queueSignOffReminders(at(1, 10));
    expect(await reminders(id)).toBe(1);
  });
});
