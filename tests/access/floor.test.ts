import { beforeAll, describe, expect, test } from 'vitest';
import { floorAnswer } from '@/db/queries/floor';
import { findWindow, refreshWindows } from '@/db/queries/ready-windows';
import { write } from '@/db/client';
import { routeStages } from '@/db/schema';
import { isStaffRole } from '@/lib/access';
import { OutOfReach } from '@/lib/errors';
import type { Floor } from '@/lib/floor/row';
import { openTestDatabase } from '../support/database';
import { NOW_MS, openShop } from '../support/world';
import { castNames, openCast, type Cast, type CastName } from './cast';

await openTestDatabase();
await openShop();

let cast: Cast;
beforeAll(async () => {
  await write((tx) => tx.update(routeStages).set({ bestDays: 8, likelyDays: 10, worstDays: 25 }));
  cast = await openCast();
  await refreshWindows(NOW_MS);
});

const whole = { open: 'whole', held: 'whole' } as const;
const uncleared = { open: 'whole', held: 'number' } as const;
const nothing = { open: 'nothing', held: 'nothing' } as const;

// PRODUCT.md, section 4: what the floor shows of the open build and of the one held from view; "door": it has no floor.
const onTheFloor: Record<CastName, { open: string; held: string } | 'door'> = {
  'its buyer': 'door',
  'the artist who owns the held build': 'door',
  'another buyer': 'door',
  'a buyer with a stray assignment': 'door',
  'a companion of both': 'door',
  'an assigned builder': uncleared,
  'a cleared builder': whole,
  'a builder taken off': nothing,
  'a builder on another build': nothing,
  'a builder named as companion': nothing,
  'a lead of every build': uncleared,
  'a lead of the route': uncleared,
  'a lead of another route': nothing,
  'a lead of the stage it is in': uncleared,
  'a lead of another stage': nothing,
  'a lead of the route in another stage': nothing,
  'a lead whose rule has ended': nothing,
  'an assigned rep': uncleared,
  'a cleared rep': whole,
  'a rep on another build': nothing,
  'an admin': { open: 'number', held: 'number' },
  'an admin who has stepped in': whole,
};

const windowReaders: CastName[] = [
  'its buyer',
  'a companion of both',
  'an assigned builder',
  'a cleared builder',
  'a lead of every build',
  'a lead of the route',
  'a lead of the stage it is in',
  'an assigned rep',
  'a cleared rep',
  'an admin who has stepped in',
];
const heldWindowReaders: CastName[] = [
  'the artist who owns the held build',
  'a cleared builder',
  'a cleared rep',
  'an admin who has stepped in',
];

function shownOf({ rows, numbersOnly }: Floor, orderNumber: string): string {
  if (rows.some((row) => row.orderNumber === orderNumber)) return 'whole';
  return numbersOnly.includes(orderNumber) ? 'number' : 'nothing';
}

describe.each(castNames.map((who) => ({ who })))('$who', ({ who }) => {
  test('sees exactly this of each build on the floor', async () => {
    const viewer = cast.people(who);
    if (!isStaffRole(viewer.role)) {
      expect(onTheFloor[who]).toBe('door');
      await expect(floorAnswer(viewer, null, NOW_MS)).rejects.toThrow(OutOfReach);
      return;
    }
    const floor: Floor = JSON.parse((await floorAnswer(viewer, null, NOW_MS)).text ?? '');
    const shown = { open: shownOf(floor, cast.open.orderNumber), held: shownOf(floor, cast.held.orderNumber) };
    expect(shown).toEqual(onTheFloor[who]);
  });

  test('reads exactly these ready windows', async () => {
    const viewer = cast.people(who);
    expect((await findWindow(viewer, cast.open.id)) !== null).toBe(windowReaders.includes(who));
    expect((await findWindow(viewer, cast.held.id)) !== null).toBe(heldWindowReaders.includes(who));
  });
});
