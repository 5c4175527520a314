import { eq } from 'drizzle-orm';
import { describe, expect, test } from 'vitest';
import { db } from '@/db/client';
import { requireBuild } from '@/db/queries/builds';
import { endAssignment } from '@/db/queries/assignments';
import { removeCompanion } from '@/db/queries/companions';
import { holdBuild } from '@/db/queries/holds';
import { closePerson, endSessionsOf, reopenPerson } from '@/db/queries/people';
import {
  endOtherSessions,
  endSession,
  findSessionViewer,
  listOwnSessions,
  type SessionViewer,
} from '@/db/queries/sessions';
import { purgeExpiredSignIns, startSession } from '@/db/queries/sign-in';
import { assignments, sessions, users } from '@/db/schema';
import { newToken } from '@/lib/auth/secrets';
import { OutOfReach } from '@/lib/errors';
import { openTestDatabase } from '../support/database';
import { DAY_MS, makeBuild, makePerson, makeSession, NOW_MS, openShop } from '../support/world';

await openTestDatabase();
await openShop();

const HOUR_MS = 3_600_000;

async function requireSession(token: string, nowMs = NOW_MS): Promise<SessionViewer> {
  const viewer = await findSessionViewer(token, nowMs);
  if (!viewer) throw new Error('no such session');
  return viewer;
}

// SECURITY.md P11: idle 12 h staff and 14 d clients, absolute 7 d and 30 d.
describe.each([
  { role: 'buyer', idleMs: 14 * DAY_MS, absoluteMs: 30 * DAY_MS },
  { role: 'artist', idleMs: 14 * DAY_MS, absoluteMs: 30 * DAY_MS },
  { role: 'builder', idleMs: 12 * HOUR_MS, absoluteMs: 7 * DAY_MS },
  { role: 'rep', idleMs: 12 * HOUR_MS, absoluteMs: 7 * DAY_MS },
  { role: 'admin', idleMs: 12 * HOUR_MS, absoluteMs: 7 * DAY_MS },
] as const)('a session of a $role', ({ role, idleMs, absoluteMs }) => {
  test('ends when it is not used for that long, and not before', async () => {
    const person = await makePerson(role);
    expect(await findSessionViewer(await makeSession(person.id, NOW_MS), NOW_MS + idleMs - 1)).not.toBeNull();
    expect(await findSessionViewer(await makeSession(person.id, NOW_MS), NOW_MS + idleMs)).toBeNull();
  });

  test('ends at its latest, however much it is used', async () => {
    const token = await makeSession((await makePerson(role)).id, NOW_MS);
    const step = idleMs / 2;
    for (let at = 0; at < absoluteMs; at += step) expect(await findSessionViewer(token, NOW_MS + at)).not.toBeNull();
    expect(await findSessionViewer(token, NOW_MS + absoluteMs - 1)).not.toBeNull();
    expect(await findSessionViewer(token, NOW_MS + absoluteMs)).toBeNull();
  });
});

describe('a session', () => {
  test('of anybody else’s token, of its own hash, or of none is nobody’s', async () => {
    const person = await makePerson('buyer');
    await makeSession(person.id, NOW_MS);
    const [row] = await db().select().from(sessions).where(eq(sessions.userId, person.id));
    for (const token of ['', newToken(), row?.tokenHash ?? '', row?.id ?? '']) {
      expect(await findSessionViewer(token, NOW_MS)).toBeNull();
    }
  });

  test('is nobody’s from the moment its account is closed, by whatever way', async () => {
    const person = await makePerson('buyer');
    const token = await makeSession(person.id, NOW_MS);
    await db().update(users).set({ disabledAt: NOW_MS }).where(eq(users.id, person.id));
    expect(await findSessionViewer(token, NOW_MS)).toBeNull();
  });

  test('being read writes at most once in five minutes', async () => {
    const person = await makePerson('buyer');
    const token = await makeSession(person.id, NOW_MS);
    const seen = async () => (await db().select().from(sessions).where(eq(sessions.userId, person.id)))[0]?.lastSeenAt;
    await findSessionViewer(token, NOW_MS + 5 * 60_000);
    expect(await seen()).toBe(NOW_MS);
    await findSessionViewer(token, NOW_MS + 5 * 60_000 + 1);
    expect(await seen()).toBe(NOW_MS + 5 * 60_000 + 1);
  });

  test('started anew in the same browser ends the one that was there, and only that', async () => {
    const person = await makePerson('buyer');
    const [here, elsewhere] = [await makeSession(person.id, NOW_MS), await makeSession(person.id, NOW_MS)];
    const next = { userId: person.id, token: newToken(), replaces: here, device: 'Firefox', nowMs: NOW_MS };
    await startSession(next);
    expect(await findSessionViewer(here, NOW_MS)).toBeNull();
    expect(await findSessionViewer(elsewhere, NOW_MS)).not.toBeNull();
    expect(await findSessionViewer(next.token, NOW_MS)).not.toBeNull();
  });

  test('is listed to its own person only, while it lasts, without what could be used as a token', async () => {
    const [person, other] = [await makePerson('buyer'), await makePerson('buyer')];
    await makeSession(person.id, NOW_MS);
    await makeSession(person.id, NOW_MS - 15 * DAY_MS);
    await makeSession(other.id, NOW_MS);
    const listed = await listOwnSessions(person, NOW_MS);
    expect(listed).toHaveLength(1);
    expect(Object.keys(listed[0] ?? {}).sort()).toEqual(['createdAt', 'device', 'id', 'lastSeenAt']);
  });

  test('that is over is swept away, and a live one is not', async () => {
    const person = await makePerson('builder');
    await makeSession(person.id, NOW_MS - 13 * HOUR_MS);
    const live = await makeSession(person.id, NOW_MS);
    await purgeExpiredSignIns(NOW_MS);
    expect(await db().select().from(sessions).where(eq(sessions.userId, person.id))).toHaveLength(1);
    expect(await findSessionViewer(live, NOW_MS)).not.toBeNull();
  });
});

// SECURITY.md P5: the very next request is refused.
describe('what ends at once', () => {
  test('this session by signing out, the others by ending them', async () => {
    const person = await makePerson('buyer');
    const [here, there] = [await makeSession(person.id, NOW_MS), await makeSession(person.id, NOW_MS)];
    await endOtherSessions(await requireSession(here), NOW_MS);
    expect(await findSessionViewer(there, NOW_MS)).toBeNull();
    await endSession(await requireSession(here), NOW_MS);
    expect(await findSessionViewer(here, NOW_MS)).toBeNull();
  });

  test('every session of somebody an admin signs out, or whose account they close; reopening brings none back', async () => {
    const [admin, person] = [await makePerson('admin'), await makePerson('rep')];
    const first = await makeSession(person.id, NOW_MS);
    await endSessionsOf(admin, person.id, NOW_MS);
    expect(await findSessionViewer(first, NOW_MS)).toBeNull();
    const second = await makeSession(person.id, NOW_MS);
    await closePerson(admin, person.id, NOW_MS);
    expect(await findSessionViewer(second, NOW_MS)).toBeNull();
    await reopenPerson(admin, person.id, NOW_MS);
    expect(await findSessionViewer(second, NOW_MS)).toBeNull();
  });

  test('reaching a build: assignment ended, account closed, companion removed, build held', async () => {
    const [admin, owner, companion, friend] = [
      await makePerson('admin'),
      await makePerson('buyer'),
      await makePerson('buyer'),
      await makePerson('buyer'),
    ];
    const [builder, leaver, rep] = [await makePerson('builder'), await makePerson('builder'), await makePerson('rep')];
    const staff = [{ person: builder }, { person: leaver }, { person: rep, cleared: true }];
    const { orderNumber } = await makeBuild({ owner, companions: [companion, friend], staff });
    const everybody = [owner, companion, friend, builder, leaver, rep];
    const reachedBy = async () => {
      const loads = await Promise.allSettled(everybody.map((viewer) => requireBuild(viewer, orderNumber)));
      for (const load of loads) if (load.status === 'rejected') expect(load.reason).toBeInstanceOf(OutOfReach);
      return everybody.filter((_viewer, index) => loads[index]?.status === 'fulfilled');
    };
    expect(await reachedBy()).toEqual(everybody);
    const [assigned] = await db().select().from(assignments).where(eq(assignments.userId, builder.id));
    await endAssignment(admin, assigned?.id ?? '', NOW_MS);
    expect(await reachedBy()).toEqual([owner, companion, friend, leaver, rep]);
    await closePerson(admin, leaver.id, NOW_MS);
    expect(await reachedBy()).toEqual([owner, companion, friend, rep]);
    await removeCompanion(owner, orderNumber, companion.id, NOW_MS);
    expect(await reachedBy()).toEqual([owner, friend, rep]);
    await holdBuild(rep, orderNumber, Date.now() + DAY_MS, NOW_MS);
    expect(await reachedBy()).toEqual([owner, rep]);
    await holdBuild(rep, orderNumber, null, NOW_MS);
    expect(await reachedBy()).toEqual([owner, friend, rep]);
  });
});
