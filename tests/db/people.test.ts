import { beforeAll, describe, expect, test } from 'vitest';
import { eq } from 'drizzle-orm';
import { db, write } from '@/db/client';
import { listStandingsOf, requirePersonPage, reviewBuild, listAssignmentsOf } from '@/db/queries/access-review';
import { findBrokenLink, listAccessEvents } from '@/db/queries/audit';
import { listBuilds, listClients, listStaff, requireBuild } from '@/db/queries/builds';
import { assignStaff, stepIn } from '@/db/queries/assignments';
import { addCompanion, removeCompanion } from '@/db/queries/companions';
import { holdBuild } from '@/db/queries/holds';
import * as people from '@/db/queries/people';
import { findSessionViewer } from '@/db/queries/sessions';
import { outbox, standingAssignments, users } from '@/db/schema';
import { BadInput, Denied, OutOfReach } from '@/lib/errors';
import type { Viewer } from '@/lib/viewer';
import { openTestDatabase } from '../support/database';
import { DAY_MS, makeBuild, makePerson, makeSession, openShop, type Person } from '../support/world';

await openTestDatabase();

// The scope compares holds with the database's own clock.
const NOW_MS = Date.now();
const NEXT_YEAR_MS = NOW_MS + 365 * DAY_MS;
let admin: Person;

beforeAll(async () => {
  await openShop();
  admin = await makePerson('admin', { name: 'Nadia Brandt' });
});

const numbersOf = async (viewer: Viewer) => (await listBuilds(viewer)).map(({ orderNumber }) => orderNumber);

async function sentenceOf(refused: Promise<unknown>): Promise<Record<string, string>> {
  const error = await refused.then(
    () => null,
    (thrown: unknown) => thrown,
  );
  if (!(error instanceof BadInput)) throw new Error(`not refused as bad input: ${String(error)}`);
  return error.fields;
}

describe('closing an account', () => {
  test('ends every session, assignment and rule at once, and the owner reads who left', async () => {
    const builder = await makePerson('builder', { name: 'Tove Halloran' });
    const owner = await makePerson('buyer');
    const build = await makeBuild({ owner, staff: [{ person: builder }] });
    await write((tx) => tx.insert(standingAssignments).values({ userId: builder.id, startedAt: NOW_MS }));
    const cookies = [await makeSession(builder.id), await makeSession(builder.id)];
    expect(await findSessionViewer(cookies[0] ?? '', NOW_MS)).toMatchObject({ id: builder.id });
    await people.closePerson(admin, builder.id, NOW_MS);
    for (const cookie of cookies) expect(await findSessionViewer(cookie, NOW_MS)).toBeNull();
    expect(await numbersOf(builder)).toEqual([]);
    expect(await listStaff(owner, build.id)).toEqual([]);
    const [left] = await listAccessEvents(owner, build.orderNumber);
    expect(left).toMatchObject({ action: 'assignment_ended', subjectName: 'Tove Halloran', actorName: 'Nadia Brandt' });
  });

  test('and opening it again brings no assignment back', async () => {
    const builder = await makePerson('builder');
    await makeBuild({ staff: [{ person: builder }] });
    await people.closePerson(admin, builder.id, NOW_MS);
    await people.reopenPerson(admin, builder.id, NOW_MS);
    expect(await numbersOf(builder)).toEqual([]);
    expect(await findSessionViewer(await makeSession(builder.id), NOW_MS)).toMatchObject({ id: builder.id });
  });

  test('is not done by anybody to themselves, nor by anybody but an admin', async () => {
    const rep = await makePerson('rep');
    expect(await sentenceOf(people.closePerson(admin, admin.id, NOW_MS))).toHaveProperty('userId');
    await expect(people.closePerson(rep, admin.id, NOW_MS)).rejects.toThrow(OutOfReach);
    await expect(people.endSessionsOf(rep, admin.id, NOW_MS)).rejects.toThrow(OutOfReach);
  });
});

describe('inviting', () => {
  const invitation = { name: 'Ida', role: 'buyer', department: null, orderNumber: '' } as const;

  test('the same address twice is refused with a sentence, and mails once', async () => {
    const email = 'ida@people.example';
    await people.invitePerson(admin, { ...invitation, email }, NOW_MS);
    const again = await sentenceOf(people.invitePerson(admin, { ...invitation, email, name: 'Ida again' }, NOW_MS));
    expect(again.email).toMatch(/^[A-Z].*\.$/);
    const [ida] = await db().select({ id: users.id }).from(users).where(eq(users.email, email));
    expect(
      await db()
        .select({ id: outbox.id })
        .from(outbox)
        .where(eq(outbox.userId, ida?.id ?? '')),
    ).toHaveLength(1);
  });

  test('an owner to an unknown or owned order invites nobody', async () => {
    const owned = await makeBuild({ owner: await makePerson('buyer') });
    for (const orderNumber of ['Q-0', owned.orderNumber]) {
      const email = `${orderNumber.toLowerCase()}@people.example`;
      const refused = await sentenceOf(people.invitePerson(admin, { ...invitation, email, orderNumber }, NOW_MS));
      expect(refused).toHaveProperty('orderNumber');
      expect(await db().select({ id: users.id }).from(users).where(eq(users.email, email))).toEqual([]);
    }
  });

  test.each([null, 'no such room'])('a builder needs a department of this shop, not %j', async (department) => {
    const builder = { ...invitation, role: 'builder', email: 'b@people.example', department } as const;
    expect(await sentenceOf(people.invitePerson(admin, builder, NOW_MS))).toHaveProperty('department');
  });
});

describe('assigning', () => {
  test('a list with one unknown order number assigns nothing', async () => {
    const builder = await makePerson('builder');
    const [first, last] = [await makeBuild(), await makeBuild()];
    const orderNumbers = [first.orderNumber, 'Q-0', last.orderNumber];
    const wish = { userId: builder.id, orderNumbers, cleared: false };
    expect((await sentenceOf(assignStaff(admin, wish, NOW_MS))).orderNumbers).toContain('Q-0');
    expect(await numbersOf(builder)).toEqual([]);
  });

  test('staff and client sides never mix: no client is assigned, and no role crosses over', async () => {
    const buyer = await makePerson('buyer');
    const builder = await makePerson('builder');
    const build = await makeBuild();
    const wish = { userId: buyer.id, orderNumbers: [build.orderNumber], cleared: false };
    expect(await sentenceOf(assignStaff(admin, wish, NOW_MS))).toHaveProperty('userId');
    for (const [userId, role] of [
      [buyer.id, 'rep'],
      [builder.id, 'artist'],
    ] as const) {
      const change = { userId, role, department: null };
      expect(await sentenceOf(people.changePerson(admin, change, NOW_MS))).toHaveProperty('role');
    }
    expect(await numbersOf(buyer)).toEqual([]);
  });

  test('again with clearance lets somebody who is on a held build see it', async () => {
    const builder = await makePerson('builder');
    const build = await makeBuild({ staff: [{ person: builder }], heldUntilAt: NEXT_YEAR_MS });
    expect(await numbersOf(builder)).toEqual([]);
    const wish = { userId: builder.id, orderNumbers: [build.orderNumber], cleared: true };
    expect(await assignStaff(admin, wish, NOW_MS)).toBe(1);
    expect(await assignStaff(admin, wish, NOW_MS)).toBe(0);
    expect(await numbersOf(builder)).toEqual([build.orderNumber]);
  });

  test('a rep who becomes an admin leaves every build', async () => {
    const rep = await makePerson('rep');
    const build = await makeBuild({ staff: [{ person: rep, cleared: true }] });
    await people.changePerson(admin, { userId: rep.id, role: 'admin', department: null }, NOW_MS);
    await expect(requireBuild({ ...rep, role: 'admin' }, build.orderNumber)).rejects.toThrow(OutOfReach);
  });
});

describe('stepping in', () => {
  test('opens the build to the admin, and its owner reads who and why', async () => {
    const owner = await makePerson('buyer');
    const build = await makeBuild({ owner });
    await expect(requireBuild(admin, build.orderNumber)).rejects.toThrow(OutOfReach);
    const reason = 'The rep is away and the owner has asked twice.';
    await stepIn(admin, { orderNumber: build.orderNumber, reason }, NOW_MS);
    expect(await requireBuild(admin, build.orderNumber)).toMatchObject({ standing: 'assigned' });
    const events = await listAccessEvents(owner, build.orderNumber);
    expect(events).toEqual([
      expect.objectContaining({ action: 'stepped_in', reason, actorName: 'Nadia Brandt', at: NOW_MS }),
    ]);
  });

  test('is for admins only', async () => {
    const build = await makeBuild();
    for (const role of ['rep', 'builder', 'buyer', 'artist'] as const) {
      const step = { orderNumber: build.orderNumber, reason: 'I would like to see it.' };
      await expect(stepIn(await makePerson(role), step, NOW_MS)).rejects.toThrow(OutOfReach);
    }
  });
});

describe('companions', () => {
  const companion = { name: 'Ines', email: 'ines@people.example' };

  test('look on at one build, and stop at once when they are removed', async () => {
    const owner = await makePerson('buyer');
    const build = await makeBuild({ owner });
    const friend = await makePerson('buyer');
    await addCompanion(owner, build.orderNumber, friend, NOW_MS);
    expect(await numbersOf(friend)).toEqual([build.orderNumber]);
    expect(await listClients(friend, build.orderNumber)).toEqual([]);
    await removeCompanion(owner, build.orderNumber, friend.id, NOW_MS);
    expect(await numbersOf(friend)).toEqual([]);
  });

  test('cannot be added while the build is held', async () => {
    const owner = await makePerson('artist');
    const build = await makeBuild({ owner, heldUntilAt: NEXT_YEAR_MS });
    expect(await sentenceOf(addCompanion(owner, build.orderNumber, companion, NOW_MS))).toHaveProperty('email');
    expect(await listClients(owner, build.orderNumber)).toHaveLength(1);
  });

  test('are added by the owner only, are never staff, and are not the owner', async () => {
    const owner = await makePerson('buyer');
    const friend = await makePerson('buyer');
    const rep = await makePerson('rep');
    const build = await makeBuild({ owner, companions: [friend], staff: [{ person: rep }] });
    for (const viewer of [friend, rep])
      await expect(addCompanion(viewer, build.orderNumber, companion, NOW_MS)).rejects.toThrow(Denied);
    for (const person of [rep, owner])
      expect(await sentenceOf(addCompanion(owner, build.orderNumber, person, NOW_MS))).toHaveProperty('email');
  });

  test('cannot take the owner, or anybody of another build, off', async () => {
    const owner = await makePerson('buyer');
    const stranger = await makePerson('buyer');
    const build = await makeBuild({ owner });
    await makeBuild({ owner: await makePerson('buyer'), companions: [stranger] });
    for (const { id } of [owner, stranger])
      await expect(removeCompanion(owner, build.orderNumber, id, NOW_MS)).rejects.toThrow(OutOfReach);
  });
});

describe('holding from view', () => {
  test('shuts out companions and uncleared staff at once, and keeps the rep who holds it in', async () => {
    const [owner, friend] = [await makePerson('artist'), await makePerson('buyer')];
    const [rep, builder] = [await makePerson('rep'), await makePerson('builder')];
    const build = await makeBuild({ owner, companions: [friend], staff: [{ person: rep }, { person: builder }] });
    await holdBuild(rep, build.orderNumber, NEXT_YEAR_MS, NOW_MS);
    expect(await numbersOf(friend)).toEqual([]);
    expect(await numbersOf(builder)).toEqual([]);
    expect(await numbersOf(owner)).toEqual([build.orderNumber]);
    expect(await numbersOf(rep)).toEqual([build.orderNumber]);
  });

  test('keeps in a rep whom only a rule had let in', async () => {
    const rep = await makePerson('rep');
    const build = await makeBuild();
    await write((tx) => tx.insert(standingAssignments).values({ userId: rep.id, startedAt: NOW_MS }));
    await holdBuild(rep, build.orderNumber, NEXT_YEAR_MS, NOW_MS);
    await holdBuild(rep, build.orderNumber, null, NOW_MS);
    expect(await requireBuild(rep, build.orderNumber)).toMatchObject({ heldUntilAt: null });
  });
});

describe('the access reviews', () => {
  test('name everybody on a build and through what, rules included', async () => {
    const [owner, friend] = [await makePerson('buyer'), await makePerson('buyer')];
    const [builder, lead] = [await makePerson('builder'), await makePerson('builder', { name: 'Floor lead' })];
    const build = await makeBuild({ owner, companions: [friend], staff: [{ person: builder }], routeId: 'bass' });
    const rule = { userId: lead.id, routeId: 'bass', startedAt: NOW_MS };
    await write((tx) => tx.insert(standingAssignments).values(rule));
    const review = await reviewBuild(admin, build.orderNumber);
    expect(review.staff.map(({ userId }) => userId)).toEqual([builder.id]);
    expect(review.clients?.map(({ userId }) => userId)).toEqual([owner.id, friend.id]);
    expect(review.byRule.map(({ userId }) => userId)).toContain(lead.id);
    expect(await listAssignmentsOf(admin, builder.id)).toEqual([
      expect.objectContaining({ orderNumber: build.orderNumber, isOpen: true }),
    ]);
  });

  test('never tell whose a held build is, from either end', async () => {
    const artist = await makePerson('artist');
    const build = await makeBuild({ owner: artist, heldUntilAt: NEXT_YEAR_MS });
    expect(await reviewBuild(admin, build.orderNumber)).toMatchObject({ isOpen: false, clients: null });
    expect(await listStandingsOf(admin, artist.id)).toEqual({ open: [], heldCount: 1 });
  });

  test('are for admins only, and an unknown person or build looks the same', async () => {
    const rep = await makePerson('rep');
    const build = await makeBuild({ staff: [{ person: rep }] });
    await expect(reviewBuild(rep, build.orderNumber)).rejects.toThrow(OutOfReach);
    await expect(requirePersonPage(rep, admin.id, NOW_MS)).rejects.toThrow(OutOfReach);
    await expect(reviewBuild(admin, 'Q-0')).rejects.toThrow(OutOfReach);
    await expect(requirePersonPage(admin, 'nobody', NOW_MS)).rejects.toThrow(OutOfReach);
  });
});

test('the list of people is whole across its pages, with many of one name', async () => {
  for (let n = 0; n < 60; n++) await makePerson('buyer', { name: 'Same Name', email: `same_${n}@names.example` });
  const first = await people.listPeople(admin, 'SAME_');
  const second = await people.listPeople(admin, 'SAME_', first.at(-1)?.id);
  expect(first).toHaveLength(50);
  expect(new Set([...first, ...second].map(({ id }) => id)).size).toBe(60);
});

test('after all of this the chain of the record holds', async () => {
  expect(await findBrokenLink()).toBeNull();
});
