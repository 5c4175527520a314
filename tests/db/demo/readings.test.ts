import { beforeAll, describe, expect, test } from 'vitest';
import { write } from '@/db/client';
import { planEntries } from '@/db/demo/diary';
import { enterBuild, type EnteredBuild } from '@/db/demo/enter-build';
import { enterPeople } from '@/db/demo/people';
import { PhotoLibrary, type LibraryPhoto } from '@/db/demo/photo-library';
import { planBuilds } from '@/db/demo/plan';
import { enterReadings } from '@/db/demo/readings';
import { demoRoutes, departmentNames } from '@/db/demo/shop-floor';
import { enterSpecs } from '@/db/demo/specs';
import { listProofLines } from '@/db/queries/proofs';
import { listReadings } from '@/db/queries/readings';
import { departments, routes } from '@/db/schema';
import { seriesOf } from '@/lib/readings/series';
import { openTestDatabase } from '../../support/database';
import { NOW_MS } from '../../support/world';

await openTestDatabase();

/** The demo world's pages without their pictures. */
class NoPictures extends PhotoLibrary {
  override ofStage(): Promise<LibraryPhoto[]> {
    return Promise.resolve([]);
  }
}

let floor: EnteredBuild[];

beforeAll(async () => {
  const plans = planBuilds(NOW_MS).slice(0, 12);
  const cast = await write(async (tx) => {
    await tx.insert(departments).values(departmentNames.map((name, position) => ({ key: name, name, position })));
    await tx.insert(routes).values(demoRoutes.map(({ name }, index) => ({ id: `route-${index}`, name })));
    return enterPeople(tx, NOW_MS);
  });
  floor = [];
  for (const plan of plans) {
    const pages = await planEntries(plan, cast, new NoPictures(320), NOW_MS);
    floor.push(await write((tx) => enterBuild(tx, plan, `route-${plan.instrument.route}`, cast, pages, NOW_MS)));
  }
  await write(async (tx) => {
    await enterSpecs(tx, floor, cast, NOW_MS);
    await enterReadings(tx, floor, NOW_MS);
  });
}, 60_000);

const build = (orderNumber: string) => {
  const found = floor.find(({ plan }) => plan.orderNumber === orderNumber);
  if (!found) throw new Error(`no build ${orderNumber}`);
  return found;
};

const viewerOf = ({ owner }: EnteredBuild) => ({ ...owner, department: null });
const readingsOf = (orderNumber: string) => listReadings(viewerOf(build(orderNumber)), orderNumber);

async function statesOf(orderNumber: string) {
  const { lines } = await listProofLines(viewerOf(build(orderNumber)), orderNumber);
  return new Map(lines.map(({ item, state }) => [item.key, state]));
}

describe('the readings of the demo world', () => {
  test('tell of a board that dries towards what the air asks for', async () => {
    const { moisture, settles, film, colours } = seriesOf(await readingsOf('Q-2417'));
    expect(moisture.map(({ value }) => value)).toEqual([11.6, 11, 10.8, 9.4, 8.4]);
    expect(Math.abs((moisture.at(-1)?.value ?? 0) - (settles.at(-1)?.value ?? 0))).toBeLessThan(0.6);
    expect(film.length).toBeGreaterThan(0);
    expect(colours).toMatchObject([{ limitDeltaE: 2 }]);
  });

  test('prove what the main story has made, all of it within', async () => {
    const readings = await readingsOf('Q-2417');
    expect(readings.filter(({ shown }) => shown?.standing === 'outside')).toEqual([]);
    const states = await statesOf('Q-2417');
    for (const key of ['scale_length', 'nut_width', 'body_wood', 'fret_wire'])
      expect([key, states.get(key)]).toEqual([key, 'proven']);
    expect(states.get('gloss')).toBe('open');
  });

  test('leave one value out of tolerance, and one that its owner let pass', async () => {
    expect((await statesOf('Q-2420')).get('last_fret_width')).toBe('out_of_tolerance');
    expect((await statesOf('Q-2422')).get('neck_depth_12')).toBe('conceded');
  });
});
