import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import { db, write } from '@/db/client';
import { saveAway } from '@/db/queries/away';
import { assignStaff, endAssignment } from '@/db/queries/assignments';
import { holdBuild } from '@/db/queries/holds';
import { closePerson } from '@/db/queries/people';
import { listPenPasses, listPenTakers, passPen } from '@/db/queries/pen';
import { requireAskable } from '@/db/queries/question-form';
import { findTopicSetUp, saveFallback, saveLead } from '@/db/queries/topics';
import { assignments, penPasses, shop, users } from '@/db/schema';
import { BadInput, Denied, OutOfReach } from '@/lib/errors';
import { tendQuestions } from '@/lib/jobs/question-clock';
import { openTestDatabase } from '@/tests/support/database';
import { askOn, holderOf, mailKindsFor, openThread, rowOf, writeOn } from '@/tests/support/question-world';
import { DAY_MS, makeBuild, makePerson, NOW_MS, openShop } from '@/tests/support/world';

await openTestDatabase();
beforeAll(openShop);

const reasonsOf = async (questionId: string) =>
  (await db().select().from(penPasses).where(eq(penPasses.questionId, questionId))).map(({ reason }) => reason);

const assignmentOf = async (userId: string) => {
  const [row] = await db().select({ id: assignments.id }).from(assignments).where(eq(assignments.userId, userId));
  return row?.id ?? '';
};

describe('a question finds who can answer', () => {
  test('passing over who is out of office, with a note why', async () => {
    const { owner, builder, rep, build } = await openThread();
    await saveAway(builder, { fromAt: NOW_MS - 1, untilAt: NOW_MS + DAY_MS }, NOW_MS);
    const { id } = await askOn(build, owner);
    expect(await holderOf(rep, id)).toBe('Ruth Adeyemi');
    expect(await reasonsOf(id)).toEqual(['Routed by topic. Bo Lindgren is out of office.']);
    const later = await askOn(build, owner, { atMs: NOW_MS + DAY_MS });
    expect(await holderOf(rep, later.id)).toBe('Bo Lindgren');
  });

  test('at the department’s lead only where they reach the build', async () => {
    const admin = await makePerson('admin');
    const lead = await makePerson('builder', { name: 'Ines Barros' });
    const [owner, rep] = [await makePerson('buyer'), await makePerson('rep', { name: 'Oskar Penhallow' })];
    const build = await makeBuild({ owner, staff: [{ person: rep }] });
    await saveLead(admin, 'neck', lead.id);
    expect(await holderOf(rep, (await askOn(build, owner)).id)).toBe('Oskar Penhallow');
    const changed = { userId: lead.id, orderNumbers: [build.orderNumber], cleared: false };
    await write((tx) => tx.update(users).set({ department: 'wood' }).where(eq(users.id, lead.id)));
    await assignStaff(admin, changed, NOW_MS);
    expect(await holderOf(rep, (await askOn(build, owner)).id)).toBe('Ines Barros');
    await saveLead(admin, 'neck', '');
  });

  test('or nobody: it is asked all the same, the asker reads that the shop has it, and the admin sees the number alone', async () => {
    const [owner, admin] = [await makePerson('buyer'), await makePerson('admin')];
    const build = await makeBuild({ owner });
    const { topics } = await requireAskable(owner, build.orderNumber, null);
    expect(topics.map(({ answerer }) => answerer)).toEqual([null, null, null]);
    const { id } = await askOn(build, owner, { text: 'A secret wish.' });
    expect(await rowOf(id)).toMatchObject({ penHolderId: null, state: 'waiting' });
    const { stuck } = await findTopicSetUp(admin);
    const told = stuck.find((row) => row.id === id);
    expect(told?.orderNumber).toBe(build.orderNumber);
    expect(JSON.stringify(told)).not.toMatch(/secret|Fret wire/);
  });

  test('whom the admin named takes what nobody else can, if they reach the build', async () => {
    const [owner, admin, named] = [
      await makePerson('buyer'),
      await makePerson('admin'),
      await makePerson('admin', { name: 'Nadia' }),
    ];
    const reached = await makeBuild({ owner, staff: [{ person: named, stepInReason: 'Asked to' }] });
    const other = await makeBuild({ owner });
    await saveFallback(admin, named.id);
    expect(await holderOf(owner, (await askOn(reached, owner, { topicId: 'money' })).id)).toBe('Nadia');
    const { id } = await askOn(other, owner, { topicId: 'money' });
    expect(await holderOf(owner, id)).toBeNull();
    expect(await reasonsOf(id)).toEqual(['Nobody on this build can answer. Nadia is not on this build.']);
    await write((tx) => tx.update(shop).set({ fallbackUserId: null }));
  });
});

describe('an open question is routed again', () => {
  test('when its holder is taken off the build, and the next one is told by mail', async () => {
    const { owner, builder, rep, build } = await openThread();
    const { id } = await askOn(build, owner);
    await endAssignment(await makePerson('admin'), await assignmentOf(builder.id), NOW_MS);
    expect(await holderOf(rep, id)).toBe('Ruth Adeyemi');
    expect(await mailKindsFor(rep)).toEqual(['question']);
  });

  test('when its holder’s account is closed; a closed question stays as it was', async () => {
    const { owner, builder, rep, build } = await openThread();
    const [open, answered] = [await askOn(build, owner), await askOn(build, owner)];
    await writeOn(builder, answered.id, NOW_MS + 1);
    await closePerson(await makePerson('admin'), builder.id, NOW_MS);
    expect(await holderOf(rep, open.id)).toBe('Ruth Adeyemi');
    expect(await holderOf(rep, answered.id)).toBe('Ruth Adeyemi');
    expect(await mailKindsFor(rep)).toEqual(['question']);
  });

  test('when the build is held from a holder who is not cleared', async () => {
    const { owner, rep, build } = await openThread();
    const { id } = await askOn(build, owner);
    await holdBuild(rep, build.orderNumber, Date.now() + DAY_MS, NOW_MS);
    expect(await holderOf(rep, id)).toBe('Ruth Adeyemi');
  });

  test('when somebody comes who can answer what nobody could', async () => {
    const [owner, rep, admin] = [await makePerson('buyer'), await makePerson('rep'), await makePerson('admin')];
    const build = await makeBuild({ owner });
    const { id } = await askOn(build, owner, { topicId: 'money' });
    await assignStaff(admin, { userId: rep.id, orderNumbers: [build.orderNumber], cleared: false }, NOW_MS);
    expect((await rowOf(id)).penHolderId).toBe(rep.id);
  });

  test('when its holder’s days away begin, by the clock’s job; nobody else there, it stays', async () => {
    const { owner, builder, rep, build } = await openThread();
    const { id } = await askOn(build, owner);
    await saveAway(builder, { fromAt: NOW_MS + DAY_MS, untilAt: null }, NOW_MS);
    expect(await holderOf(rep, id)).toBe('Bo Lindgren');
    await tendQuestions(NOW_MS + DAY_MS);
    expect(await holderOf(rep, id)).toBe('Ruth Adeyemi');
    await saveAway(rep, { fromAt: NOW_MS, untilAt: null }, NOW_MS + DAY_MS);
    await tendQuestions(NOW_MS + DAY_MS);
    expect(await holderOf(rep, id)).toBe('Ruth Adeyemi');
  });
});

describe('the pen can be passed', () => {
  const to = (person: { id: string }) => ({ toId: person.id, reason: 'You see it better.' });

  test('by who holds it and by a rep, with a reason that the shop reads and the next holder gets mail of', async () => {
    const { owner, builder, painter, rep, build } = await openThread();
    const { id } = await askOn(build, owner);
    await passPen(builder, id, to(painter), NOW_MS);
    expect(await holderOf(rep, id)).toBe('Tove Järvi');
    expect(await mailKindsFor(painter)).toEqual(['question']);
    await passPen(rep, id, to(rep), NOW_MS + 1);
    const passes = await listPenPasses(painter, id);
    expect(passes.map(({ from, to, by, reason }) => [from, to, by, reason])).toEqual([
      ['Bo Lindgren', 'Tove Järvi', 'Bo Lindgren', 'You see it better.'],
      ['Tove Järvi', 'Ruth Adeyemi', 'Ruth Adeyemi', 'You see it better.'],
    ]);
    await expect(listPenPasses(owner, id)).rejects.toBeInstanceOf(Denied);
  });

  test('not by another builder nor by the owner, and not to who could not read it', async () => {
    const { owner, builder, painter, rep, companion, build } = await openThread();
    const { id } = await askOn(build, owner);
    await expect(passPen(painter, id, to(rep), NOW_MS)).rejects.toBeInstanceOf(Denied);
    await expect(passPen(owner, id, to(rep), NOW_MS)).rejects.toBeInstanceOf(Denied);
    await expect(passPen(companion, id, to(rep), NOW_MS)).rejects.toBeInstanceOf(OutOfReach);
    for (const nobody of [owner, await makePerson('rep'), builder])
      await expect(passPen(builder, id, to(nobody), NOW_MS)).rejects.toBeInstanceOf(BadInput);
    const money = await askOn(build, owner, { topicId: 'money' });
    await expect(passPen(rep, money.id, to(builder), NOW_MS)).rejects.toBeInstanceOf(BadInput);
    expect((await listPenTakers(rep, money.id, NOW_MS)).map(({ name }) => name)).toEqual([]);
    const takers = (await listPenTakers(rep, id, NOW_MS)).map(({ name }) => name);
    expect(takers.sort()).toEqual(['Ruth Adeyemi', 'Tove Järvi']);
  });
});
