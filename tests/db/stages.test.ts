import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import { db, write } from '@/db/client';
import { askForChange, signSignOff, withdrawSignOff } from '@/db/queries/sign-off-answers';
import { moveBack, startStage, undoMove } from '@/db/queries/stages';
import { buildStages, stageMoves } from '@/db/schema';
import { BadInput, Denied } from '@/lib/errors';
import { openTestDatabase } from '@/tests/support/database';
import { askDrawing, signOffCast } from '@/tests/support/sign-off-world';
import { makeBuild, NOW_MS, openShop, type TestBuild } from '@/tests/support/world';
import type { Viewer } from '@/lib/viewer';

await openTestDatabase();
beforeAll(openShop);

const LATER = NOW_MS + 60_000;
const SECOND_MS = 1000;

type Key = 'wood' | 'neck' | 'finish';

function stageId(build: TestBuild, key: Key): string {
  const stage = build.stages.find((known) => known.key === key);
  if (!stage) throw new Error(`no stage ${key}`);
  return stage.id;
}

const moveTo = (build: TestBuild, key: Key, by: Viewer) => ({
  buildId: build.id,
  stageId: stageId(build, key),
  byId: by.id,
});

const start = (build: TestBuild, key: Key, by: Viewer, atMs = LATER) =>
  write((tx) => startStage(tx, moveTo(build, key, by), atMs));

const back = (build: TestBuild, key: Key, by: Viewer, reason = 'A scratch on the back', atMs = LATER) =>
  write((tx) => moveBack(tx, moveTo(build, key, by), reason, atMs));

const undo = (build: TestBuild, moveId: string, by: Viewer, atMs: number) =>
  write((tx) => undoMove(tx, build.id, moveId, by.id, atMs));

/** How each stage stands: `-` ahead, `>` the one of now, `x` finished. */
async function standing(build: TestBuild): Promise<string> {
  const rows = await db()
    .select({ startedAt: buildStages.startedAt, finishedAt: buildStages.finishedAt })
    .from(buildStages)
    .where(eq(buildStages.buildId, build.id))
    .orderBy(buildStages.position);
  return rows.map(({ startedAt, finishedAt }) => (finishedAt !== null ? 'x' : startedAt !== null ? '>' : '-')).join('');
}

const movesOf = (build: TestBuild) => db().select().from(stageMoves).where(eq(stageMoves.buildId, build.id));

const sentence = (work: Promise<unknown>, field: string) =>
  work.then(
    () => 'nothing was refused',
    (error: unknown) => {
      if (error instanceof BadInput) return error.fields[field] ?? 'another field';
      throw error;
    },
  );

describe('starting a stage', () => {
  test('ends the one before, and is kept as a move', async () => {
    const { build, builder } = await signOffCast();
    await start(build, 'neck', builder);
    expect(await standing(build)).toBe('x>-');
    expect(await movesOf(build)).toMatchObject([
      { fromStageId: stageId(build, 'wood'), toStageId: stageId(build, 'neck'), movedById: builder.id, movedAt: LATER },
    ]);
  });

  test('ends those that were passed over with it', async () => {
    const { build, builder } = await signOffCast();
    await start(build, 'finish', builder);
    expect(await standing(build)).toBe('xx>');
  });

  test('twice is once', async () => {
    const { build, builder } = await signOffCast();
    await start(build, 'neck', builder);
    expect(await start(build, 'neck', builder, LATER + 5)).toBeNull();
    expect(await movesOf(build)).toHaveLength(1);
  });

  test('of another build is refused at its field', async () => {
    const { build, builder } = await signOffCast();
    const other = await makeBuild();
    const foreign = { buildId: build.id, stageId: stageId(other, 'neck'), byId: builder.id };
    const tried = write((tx) => startStage(tx, foreign, LATER));
    expect(await sentence(tried, 'stageId')).toMatch(/not on this build’s route/);
    expect(await standing(build)).toBe('>--');
  });
});

describe('a stage that waits for the owner', () => {
  const blocked = async () => {
    const cast = await signOffCast();
    const signOffId = await askDrawing(cast.build, cast.rep, { blocksStageKey: 'neck' });
    return { ...cast, signOffId };
  };
  const says =
    'Neck & frets waits for the owner to sign “Headstock logo, drawing 1”. It can start as soon as that is signed; ask the rep.';

  test('cannot be started, and nothing moves', async () => {
    const { build, builder } = await blocked();
    expect(await sentence(start(build, 'neck', builder), 'stageId')).toBe(says);
    expect(await standing(build)).toBe('>--');
    expect(await movesOf(build)).toEqual([]);
  });

  test('cannot be passed over either', async () => {
    const { build, builder } = await blocked();
    expect(await sentence(start(build, 'finish', builder), 'stageId')).toBe(says);
  });

  test('is free once it is signed', async () => {
    const { build, builder, owner, signOffId } = await blocked();
    await signSignOff(owner, { signOffId, name: owner.name }, LATER);
    await start(build, 'neck', builder);
    expect(await standing(build)).toBe('x>-');
  });

  test('is free once the shop took it back', async () => {
    const { build, builder, rep, signOffId } = await blocked();
    await withdrawSignOff(rep, signOffId, LATER);
    await start(build, 'neck', builder);
    expect(await standing(build)).toBe('x>-');
  });

  test('still waits when the owner asked for a change, and for what takes its place', async () => {
    const { build, builder, owner, rep, signOffId } = await blocked();
    await askForChange(owner, { signOffId, words: 'Wider' }, LATER);
    expect(await sentence(start(build, 'neck', builder), 'stageId')).toBe(says);
    const title = 'Headstock logo, drawing 2';
    const next = await askDrawing(build, rep, { replacesId: signOffId, title, blocksStageKey: 'neck' }, LATER);
    expect(await sentence(start(build, 'neck', builder), 'stageId')).toContain(title);
    await signSignOff(owner, { signOffId: next, name: owner.name }, LATER);
    await start(build, 'neck', builder);
    expect(await standing(build)).toBe('x>-');
  });

  test('does not hold up a stage before it, nor another build', async () => {
    const { build, builder, rep, owner } = await signOffCast();
    await askDrawing(build, rep, { blocksStageKey: 'finish' });
    await start(build, 'neck', builder);
    expect(await standing(build)).toBe('x>-');
    const other = await makeBuild({ owner, staff: [{ person: builder }] });
    await start(other, 'finish', builder);
    expect(await standing(other)).toBe('xx>');
  });

  test('what blocks nothing holds nothing up', async () => {
    const { build, builder, rep } = await signOffCast();
    await askDrawing(build, rep, { blocksStageKey: null });
    await start(build, 'finish', builder);
    expect(await standing(build)).toBe('xx>');
  });
});

describe('moving back', () => {
  test('opens the earlier stage again, and the later ones are ahead once more', async () => {
    const { build, builder } = await signOffCast({ stageKey: 'finish' });
    await back(build, 'wood', builder);
    expect(await standing(build)).toBe('>--');
    expect(await movesOf(build)).toMatchObject([
      { reason: 'A scratch on the back', toStageId: stageId(build, 'wood') },
    ]);
  });

  test('needs a reason, and a stage it has been in', async () => {
    const { build, builder } = await signOffCast({ stageKey: 'neck' });
    expect(await sentence(back(build, 'wood', builder, ' \n'), 'reason')).toMatch(/^Say why/);
    expect(await sentence(back(build, 'finish', builder), 'stageId')).toMatch(/Choose an earlier one/);
    expect(await standing(build)).toBe('x>-');
  });

  test('makes a signature block again what has not begun any more', async () => {
    const { build, builder, rep } = await signOffCast({ stageKey: 'neck' });
    await back(build, 'wood', builder);
    await askDrawing(build, rep, { blocksStageKey: 'neck' });
    expect(await sentence(start(build, 'neck', builder), 'stageId')).toMatch(/waits for the owner/);
  });
});

describe('taking a move back', () => {
  test('puts every stage as it was, its times included', async () => {
    const { build, builder } = await signOffCast();
    const before = await db().select().from(buildStages).where(eq(buildStages.buildId, build.id));
    const moveId = await start(build, 'finish', builder);
    await undo(build, moveId ?? '', builder, LATER + 10 * SECOND_MS);
    expect(await db().select().from(buildStages).where(eq(buildStages.buildId, build.id))).toEqual(before);
  });

  test('twice is once', async () => {
    const { build, builder } = await signOffCast();
    const moveId = (await start(build, 'neck', builder)) ?? '';
    await undo(build, moveId, builder, LATER + SECOND_MS);
    await undo(build, moveId, builder, LATER + 2 * SECOND_MS);
    expect(await standing(build)).toBe('>--');
  });

  test('is refused when it is too late, by anybody else, and once somebody moved on', async () => {
    const { build, builder, rep } = await signOffCast();
    const first = (await start(build, 'neck', builder)) ?? '';
    await expect(undo(build, first, builder, LATER + 15 * SECOND_MS + 1)).rejects.toThrow(Denied);
    await expect(undo(build, first, rep, LATER + SECOND_MS)).rejects.toThrow(Denied);
    await start(build, 'finish', rep, LATER + SECOND_MS);
    await expect(undo(build, first, builder, LATER + 2 * SECOND_MS)).rejects.toThrow(Denied);
    expect(await standing(build)).toBe('xx>');
  });
});
