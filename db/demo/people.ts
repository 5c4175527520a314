import { addressOf, admin, artists, builders, buyers, companion, furtherBuyers, reps, type CastMember } from './cast';
import { DAY_MS } from './timeline';
import type { Tx } from '../client';
import { mailSettings, users } from '../schema';
import { newId } from '../schema/columns';
import { isClientRole } from '@/lib/access';
import { nextDigestAt } from '@/lib/schedule/digest-times';

export type Person = CastMember & { id: string };

const cadences = ['weekly', 'daily', 'at_once', 'weekly', 'none'] as const;

/** Enters everybody of the demo world. @returns them by their place in the cast */
export async function enterPeople(tx: Tx, nowMs: number) {
  let count = 0;
  const enter = async (member: CastMember): Promise<Person> => {
    const person = { ...member, id: newId() };
    const { id, name, role, department, timeZone } = person;
    const at = nowMs - 400 * DAY_MS + count * 1000;
    await tx.insert(users).values({
      id,
      name,
      role,
      department,
      timeZone,
      email: addressOf(member),
      timeZoneAskedAt: at,
      emailVerifiedAt: at,
      createdAt: at,
    });
    if (isClientRole(role)) await enterMailWish(tx, person, cadences[count % cadences.length] ?? 'weekly', nowMs);
    count++;
    return person;
  };
  const all = async (members: CastMember[]) => {
    const entered: Person[] = [];
    for (const member of members) entered.push(await enter(member));
    return entered;
  };
  const staff = { admin: await enter(admin), reps: await all(reps), builders: await all(builders) };
  count = 0;
  return {
    ...staff,
    buyers: await all(buyers),
    artists: await all(artists),
    companion: await enter(companion),
    furtherBuyers: await all(furtherBuyers),
  };
}

export type Cast = Awaited<ReturnType<typeof enterPeople>>;

async function enterMailWish(tx: Tx, person: Person, cadence: (typeof cadences)[number], nowMs: number): Promise<void> {
  const plan = { cadence, hourLocal: cadence === 'weekly' ? 17 : 8, weekday: 5 };
  const next = cadence === 'at_once' ? null : nextDigestAt({ ...plan, zone: person.timeZone }, nowMs);
  await tx.insert(mailSettings).values({ userId: person.id, ...plan, nextDigestAt: next });
}
