import { beforeAll, describe, expect, test } from 'vitest';
import { write } from '@/db/client';
import { readAsBuilt } from '@/db/queries/as-built';
import { keepCheck, tellOfCheck } from '@/db/queries/check-telling';
import {
  addCheckLine,
  addCheckList,
  changeCheckLine,
  listCheckLists,
  removeCheckLine,
  retireCheckList,
} from '@/db/queries/check-lists';
import { finishCheck, listChecks, markLine, requireCheckRun, startCheck } from '@/db/queries/checks';
import { askConcession, deliverBuild, passFinalCheck, readFinalCheck, shipBuild } from '@/db/queries/final-check';
import { linkProof, listLinkableEntries, listProofLines, unlinkProof } from '@/db/queries/proofs';
import { checkLines, checkLists } from '@/db/schema';
import { BadInput, Denied, OutOfReach } from '@/lib/errors';
import type { Viewer } from '@/lib/viewer';
import { openTestDatabase } from '../support/database';
import { makeVersion } from '../support/proof';
import { smallSpec } from '../support/spec';
import { makeBuild, makeEntry, makePerson, NOW_MS, openShop, type TestBuild } from '../support/world';

await openTestDatabase();
await openShop();
beforeAll(() =>
  write(async (tx) => {
    await tx.insert(checkLists).values({ id: 'list', routeId: 'solid', stageKey: 'wood', name: 'Before paint' });
    await tx.insert(checkLines).values({ id: 'line', listId: 'list', position: 1, text: 'Edges even.' });
  }),
);

async function openScene() {
  const people = {
    owner: await makePerson('buyer'),
    companion: await makePerson('buyer'),
    'another buyer': await makePerson('buyer'),
    builder: await makePerson('builder'),
    'another builder': await makePerson('builder'),
    rep: await makePerson('rep'),
    'another rep': await makePerson('rep'),
    'an admin': await makePerson('admin'),
    'an admin who has stepped in': await makePerson('admin'),
  };
  const steppedIn = { person: people['an admin who has stepped in'], stepInReason: 'Asked to' };
  const staff = [{ person: people.builder }, { person: people.rep }, steppedIn];
  const build = await makeBuild({ owner: people.owner, companions: [people.companion], staff });
  await makeVersion(build, people, smallSpec());
  const runId = await startCheck(people.builder, build.orderNumber, 'list', NOW_MS);
  const entryId = await makeEntry(build, people.builder);
  return { people, build, runId, entryId };
}

type Scene = Awaited<ReturnType<typeof openScene>>;
type Open = (viewer: Viewer, scene: { build: TestBuild; runId: string; entryId: string }) => Promise<unknown>;

const readers = 'owner, builder, rep, an admin who has stepped in';
const staff = 'builder, rep, an admin who has stepped in';
const reps = 'rep, an admin who has stepped in';
const link = ({ orderNumber }: TestBuild, entryId: string) => ({ orderNumber, itemKey: 'gloss', entryId });
const mark = { lineId: 'line', mark: 'pass', note: '', photoId: null } as const;
const run = ({ orderNumber }: TestBuild, runId: string) => ({ orderNumber, runId });

const doors: { name: string; by: string; open: Open }[] = [
  { name: 'reads what proves the spec', by: readers, open: (v, { build }) => listProofLines(v, build.orderNumber) },
  { name: 'reads the as-built sheet', by: readers, open: (v, { build }) => readAsBuilt(v, build.orderNumber) },
  { name: 'lists entries to link', by: staff, open: (v, { build }) => listLinkableEntries(v, build.orderNumber) },
  { name: 'links proof', by: staff, open: (v, { build, entryId }) => linkProof(v, link(build, entryId), NOW_MS) },
  { name: 'takes proof away', by: staff, open: (v, { build, entryId }) => unlinkProof(v, link(build, entryId)) },
  { name: 'lists the checks', by: staff, open: (v, { build }) => listChecks(v, build.orderNumber) },
  { name: 'begins a list', by: staff, open: (v, { build }) => startCheck(v, build.orderNumber, 'list', NOW_MS) },
  { name: 'opens a run', by: staff, open: (v, { build, runId }) => requireCheckRun(v, build.orderNumber, runId) },
  {
    name: 'marks a line',
    by: staff,
    open: (v, { build, runId }) => markLine(v, build.orderNumber, runId, mark, NOW_MS),
  },
  {
    name: 'ends a run',
    by: staff,
    open: (v, { build, runId }) => finishCheck(v, { ...run(build, runId), backToStageId: null, reason: '' }, NOW_MS),
  },
  { name: 'opens the final check', by: staff, open: (v, { build }) => readFinalCheck(v, build.orderNumber) },
  { name: 'passes the final check', by: staff, open: (v, { build }) => passFinalCheck(v, build.orderNumber, NOW_MS) },
  {
    name: 'asks for a concession',
    by: reps,
    open: (v, { build: { orderNumber } }) =>
      askConcession(v, { orderNumber, itemKey: 'gloss', reason: 'It is good.', dueOn: '2026-12-20' }, NOW_MS),
  },
];

/** Who gets past the guard; a sentence about what is missing comes after it. */
async function passes(open: Open, viewer: Viewer, scene: Scene): Promise<boolean> {
  return open(viewer, scene).then(
    () => true,
    (error: unknown) => {
      if (error instanceof BadInput) return true;
      if (error instanceof Denied && error.code === 'not_allowed') return false;
      if (error instanceof OutOfReach) return false;
      throw error;
    },
  );
}

test.each(doors)('who $name: $by', async ({ by, open }) => {
  const scene = await openScene();
  const passed: string[] = [];
  for (const [name, viewer] of Object.entries(scene.people)) if (await passes(open, viewer, scene)) passed.push(name);
  expect(passed.join(', ')).toBe(by);
});

describe('what comes after a fail and after the final check', () => {
  const later: { name: string; open: Open }[] = [
    {
      name: 'tells of a fail',
      open: (v, { build, runId }) => tellOfCheck(v, { ...run(build, runId), words: 'A dent.' }, NOW_MS),
    },
    { name: 'keeps a fail in the shop', open: (v, { build, runId }) => keepCheck(v, run(build, runId), NOW_MS) },
    {
      name: 'ships',
      open: (v, { build: { orderNumber } }) => shipBuild(v, { orderNumber, carrier: 'A carrier', number: '' }, NOW_MS),
    },
    { name: 'marks as delivered', open: (v, { build }) => deliverBuild(v, build.orderNumber, NOW_MS) },
  ];

  test.each(later)('$name is for reps of the build: everybody else is turned away first', async ({ open }) => {
    const scene = await openScene();
    for (const [name, viewer] of Object.entries(scene.people)) {
      const attempt = open(viewer, scene);
      if (reps.split(', ').includes(name))
        await expect(attempt, name).rejects.not.toMatchObject({ code: 'not_allowed' });
      else if (['owner', 'companion', 'builder'].includes(name))
        await expect(attempt, name).rejects.toMatchObject({ code: 'not_allowed' });
      else await expect(attempt, name).rejects.toThrow(OutOfReach);
    }
  });
});

describe('the lists of the shop', () => {
  const setUp: { name: string; open: (viewer: Viewer) => Promise<unknown> }[] = [
    { name: 'listed', open: listCheckLists },
    { name: 'added', open: (v) => addCheckList(v, { routeId: 'solid', stageKey: 'neck', name: 'Another' }) },
    { name: 'retired', open: (v) => retireCheckList(v, 'no-list', NOW_MS) },
    { name: 'lengthened', open: (v) => addCheckLine(v, { listId: 'list', text: 'More.', photoNeeded: false }) },
    { name: 'reworded', open: (v) => changeCheckLine(v, { lineId: 'line', text: 'New.', photoNeeded: false }, NOW_MS) },
    { name: 'shortened', open: (v) => removeCheckLine(v, 'line', NOW_MS) },
  ];

  test.each(setUp)('are $name by nobody but admins', async ({ open }) => {
    for (const role of ['buyer', 'artist', 'builder', 'rep'] as const)
      await expect(open(await makePerson(role)), role).rejects.toThrow(OutOfReach);
  });
});

test('a run is found under its own build only', async () => {
  const scene = await openScene();
  const other = await makeBuild({ staff: [{ person: scene.people.builder }] });
  await expect(requireCheckRun(scene.people.builder, other.orderNumber, scene.runId)).rejects.toThrow(OutOfReach);
  await expect(markLine(scene.people.builder, other.orderNumber, scene.runId, mark, NOW_MS)).rejects.toThrow(
    OutOfReach,
  );
});

test('while a build is held from view, only its owner and cleared staff reach its sheet and its checks', async () => {
  const people = { owner: await makePerson('buyer'), rep: await makePerson('rep') };
  const builder = await makePerson('builder');
  const staff = [{ person: people.rep, cleared: true }, { person: builder }];
  const build = await makeBuild({ owner: people.owner, staff, heldUntilAt: Date.now() + 86_400_000 });
  await makeVersion(build, people, smallSpec());
  expect(await readAsBuilt(people.owner, build.orderNumber)).not.toBeNull();
  expect(await listChecks(people.rep, build.orderNumber)).toMatchObject({ runs: [] });
  await expect(readAsBuilt(builder, build.orderNumber)).rejects.toThrow(OutOfReach);
  await expect(listChecks(builder, build.orderNumber)).rejects.toThrow(OutOfReach);
});
