import { and, eq } from 'drizzle-orm';
import { checkListsOf } from './check-lines';
import { concessionToAsk, enterDeliveries, enterReady } from './leaving';
import type { EnteredBuild } from './enter-build';
import type { Cast, Person } from './people';
import type { LibraryPhoto, PhotoLibrary } from './photo-library';
import { demoRoutes } from './shop-floor';
import { DAY_MS } from './timeline';
import type { Tx } from '../client';
import { buildStages, checkLines, checkLists, checkMarks, checkRuns, diaryEvents, entries, photos } from '../schema';
import { newId } from '../schema/columns';
import { plainNote } from '@/lib/rich-text/plain-text';
import type { CheckMark } from '@/lib/validation/checks';

const HOUR_MS = 3_600_000;

type Lists = Awaited<ReturnType<typeof enterLists>>;
type Scene = { tx: Tx; cast: Cast; lists: Lists; nowMs: number; picture: LibraryPhoto | undefined };

/** A picture for the lines that ask for one, drawn before anything is written. */
export async function drawCheckPicture(
  [first]: EnteredBuild[],
  library: PhotoLibrary,
): Promise<LibraryPhoto | undefined> {
  if (!first) return undefined;
  const { finish, instrument } = first.plan;
  const [picture] = await library.ofStage('pre-paint', { finish, body: instrument.body }, 0, 1);
  return picture;
}

/** Inspection lists for every route, walks through them on the floor, and builds that have left or are about to. */
export async function enterChecks(
  tx: Tx,
  world: {
    onFloor: EnteredBuild[];
    delivered: EnteredBuild[];
    routeIds: string[];
    cast: Cast;
    picture: LibraryPhoto | undefined;
  },
  nowMs: number,
): Promise<void> {
  const { onFloor, delivered, routeIds, cast, picture } = world;
  const scene: Scene = { tx, cast, lists: await enterLists(tx, routeIds), nowMs, picture };
  const here = onFloor.filter(({ plan }) => plan.heldUntilAt === null);
  for (const build of here) await enterPassed(scene, build);
  const fails = here.filter(({ plan }) => stageNow(plan) === 'body-joint');
  for (const [index, build] of fails.slice(0, tellings.length).entries())
    await enterFailed(scene, build, tellings[index] ?? 'undecided', nowMs - 26 * HOUR_MS);
  const [atPaint] = here.filter(({ plan }) => stageNow(plan) === 'pre-paint');
  if (atPaint) await enterUnderWay(scene, atPaint);
  const last = here.filter(({ plan }) => stageNow(plan) === 'final-check');
  for (const build of last.slice(1)) await enterPassedLast(scene, build);
  await enterReady(tx, last, nowMs);
  await concessionToAsk(tx, onFloor, nowMs);
  await enterDeliveries(tx, delivered, nowMs);
}

const stageNow = ({ stages }: EnteredBuild['plan']) =>
  stages.find(({ startedAt, finishedAt }) => startedAt !== null && finishedAt === null)?.key;

async function enterLists(tx: Tx, routeIds: string[]) {
  const entered: { id: string; route: number; stageKey: string; lines: { id: string; photoNeeded: boolean }[] }[] = [];
  for (const [route, { name: routeName }] of demoRoutes.entries()) {
    for (const { lines, ...list } of checkListsOf(routeName)) {
      const id = newId();
      await tx.insert(checkLists).values({ id, routeId: routeIds[route] ?? '', ...list });
      const rows = lines.map(({ text, photoNeeded = false }, index) => ({
        id: newId(),
        listId: id,
        position: index + 1,
        text,
        photoNeeded,
      }));
      await tx.insert(checkLines).values(rows);
      entered.push({ id, route, stageKey: list.stageKey, lines: rows });
    }
  }
  return entered;
}

function listFor({ lists }: Scene, { plan }: EnteredBuild, stageKey: string) {
  const list = lists.find((one) => one.route === plan.instrument.route && one.stageKey === stageKey);
  if (!list) throw new RangeError(`no list for ${stageKey}`);
  return list;
}

function inspectorOf({ cast }: Scene): Person {
  return cast.builders.find(({ department }) => department === 'inspection') ?? cast.admin;
}

async function stageIdOf({ tx }: Scene, build: EnteredBuild, stageKey: string): Promise<string> {
  const [stage] = await tx
    .select({ id: buildStages.id })
    .from(buildStages)
    .where(and(eq(buildStages.buildId, build.id), eq(buildStages.key, stageKey)));
  if (!stage) throw new RangeError(`no stage ${stageKey}`);
  return stage.id;
}

type Walk = { stageKey: string; startedAt: number; markOf: (index: number) => CheckMark | null; note?: string };

/** One walk through a list, line by line. @returns its id */
async function enterWalk(
  scene: Scene,
  build: EnteredBuild,
  { stageKey, startedAt, markOf, note = '' }: Walk,
  end: Partial<typeof checkRuns.$inferInsert>,
): Promise<string> {
  const { tx } = scene;
  const by = inspectorOf(scene);
  const [id, list] = [newId(), listFor(scene, build, stageKey)];
  const run = { id, buildId: build.id, stageId: await stageIdOf(scene, build, stageKey), listId: list.id, startedAt };
  await tx.insert(checkRuns).values({ ...run, startedById: by.id, ...end });
  for (const [index, line] of list.lines.entries()) {
    const mark = markOf(index);
    if (mark === null) continue;
    const markedAt = startedAt + (index + 1) * 90_000;
    const photoId = line.photoNeeded ? await enterPhoto(scene, build, by, markedAt) : null;
    const words = { mark, note: mark === 'fail' ? note : '', photoId };
    await tx.insert(checkMarks).values({ runId: id, lineId: line.id, ...words, markedById: by.id, markedAt });
  }
  return id;
}

async function enterPhoto(
  { tx, picture }: Scene,
  build: EnteredBuild,
  by: Person,
  atMs: number,
): Promise<string | null> {
  if (!picture) return null;
  const id = newId();
  await tx.insert(photos).values({
    id,
    buildId: build.id,
    uploaderId: by.id,
    uploadKey: `demo-${id}`,
    state: 'ready',
    label: 'check.jpg',
    contentType: 'image/jpeg',
    sizeBytes: picture.sizeBytes,
    sha256: '',
    originalKey: picture.keptKey,
    outPrefix: picture.outPrefix,
    widthPx: picture.widthPx,
    heightPx: picture.heightPx,
    blurDataUrl: picture.blurDataUrl,
    variantWidthsPx: picture.widthsPx.join(','),
    alt: picture.alt,
    expiresAt: atMs,
    createdAt: atMs,
  });
  return id;
}

const finished = (by: Person, outcome: 'passed' | 'failed', finishedAt: number) => ({
  outcome,
  finishedById: by.id,
  finishedAt,
});

/** A list of a stage that is over was passed in it. */
async function enterPassed(scene: Scene, build: EnteredBuild): Promise<void> {
  for (const { key, startedAt, finishedAt } of build.plan.stages) {
    if (key !== 'pre-paint' || startedAt === null || finishedAt === null) continue;
    const at = Math.max(startedAt, finishedAt - 2 * HOUR_MS);
    if (build.plan.orderNumber === 'Q-2417') await enterFailed(scene, build, 'kept', startedAt + 3 * HOUR_MS);
    const walk = {
      stageKey: key,
      startedAt: at,
      markOf: (index: number) => (index === 4 ? 'not_applicable' : 'pass'),
    } as const;
    await enterWalk(scene, build, walk, finished(inspectorOf(scene), 'passed', at + HOUR_MS));
  }
}

/** Gone through before the case closes, as soon as the build came to its last stage. */
async function enterPassedLast(scene: Scene, build: EnteredBuild): Promise<void> {
  const since = build.plan.stages.find(({ key }) => key === 'final-check')?.startedAt ?? 0;
  const startedAt = Math.max(since, scene.nowMs - 3 * DAY_MS);
  const end = finished(inspectorOf(scene), 'passed', startedAt + HOUR_MS);
  await enterWalk(scene, build, { stageKey: 'final-check', startedAt, markOf: () => 'pass' }, end);
}

const tellings = ['undecided', 'told', 'kept'] as const;
const REASON = 'A dent by the upper edge goes through to bare wood. Steam it, sand it back, and show it again.';
const TOLD =
  'Before paint we look over every edge under the lamp, and yours went back to sanding: a small dent by the upper edge. It costs two days, and you will not find it afterwards.';

/** Failed before paint and sent back to where the build is now; one still waits for the rep's word. */
async function enterFailed(
  scene: Scene,
  build: EnteredBuild,
  telling: (typeof tellings)[number],
  finishedAt: number,
): Promise<void> {
  const { tx } = scene;
  const walk: Walk = {
    stageKey: 'pre-paint',
    startedAt: finishedAt - HOUR_MS,
    markOf: (index) => (index === 1 ? 'fail' : 'pass'),
    note: 'Dent, upper edge, 3 mm.',
  };
  const decided = { decidedById: build.rep.id, decidedAt: finishedAt + 3 * HOUR_MS };
  await enterWalk(scene, build, walk, {
    ...finished(inspectorOf(scene), 'failed', finishedAt),
    backToStageId: await stageIdOf(scene, build, 'body-joint'),
    reason: REASON,
    telling,
    ...(telling === 'undecided' ? {} : decided),
    toldWords: telling === 'told' ? TOLD : null,
  });
  if (telling === 'told') await enterTold(tx, build, await stageIdOf(scene, build, 'body-joint'), decided.decidedAt);
}

async function enterTold(tx: Tx, build: EnteredBuild, stageId: string, datedAt: number): Promise<void> {
  const id = newId();
  await tx.insert(entries).values({
    id,
    buildId: build.id,
    stageId,
    authorId: build.rep.id,
    body: JSON.stringify(plainNote(TOLD)),
    bodyText: TOLD,
    audience: 'buyer',
    state: 'published',
    datedAt,
    createdAt: datedAt,
    idempotencyKey: `demo-${id}`,
  });
  await tx.insert(diaryEvents).values({ buildId: build.id, entryId: id, at: datedAt });
}

/** Half gone through: whoever opens it goes on with it. */
async function enterUnderWay(scene: Scene, build: EnteredBuild): Promise<void> {
  const startedAt = Math.max(scene.nowMs - 2 * HOUR_MS, scene.nowMs - DAY_MS);
  await enterWalk(
    scene,
    build,
    { stageKey: 'pre-paint', startedAt, markOf: (index) => (index < 3 ? 'pass' : null) },
    {},
  );
}
