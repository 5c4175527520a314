import { and, eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import { db, write } from '@/db/client';
import { unscopedProgress } from '@/db/queries/forecast-basis';
import { askForChange, signSignOff, withdrawSignOff } from '@/db/queries/sign-off-answers';
import { askForSignOff } from '@/db/queries/sign-off-asking';
import {
  listBuildSignOffs,
  listSignOffQueue,
  listWaitingSignOffs,
  parseSignOffPlace,
  requireSignOff,
} from '@/db/queries/sign-offs';
import { findShell } from '@/db/queries/shell';
import { findSubject } from '@/db/queries/sign-off-subjects';
import {
  auditEvents,
  buildPeople,
  builds,
  changeRequests,
  outbox,
  sessions,
  signOffs,
  specVersions,
} from '@/db/schema';
import { hashToken } from '@/lib/auth/secrets';
import { BadInput, Denied, OutOfReach } from '@/lib/errors';
import { chainOf } from '@/lib/sign-offs/chain';
import { openTestDatabase } from '@/tests/support/database';
import { askDrawing, makeDocument, signedIn, signOffCast } from '@/tests/support/sign-off-world';
import { DAY_MS, makeBuild, makePerson, NOW_MS, openShop, type TestBuild } from '@/tests/support/world';
import type { Viewer } from '@/lib/viewer';

await openTestDatabase();
beforeAll(openShop);

const HASH = 'c0ffee'.padEnd(64, '0');
const sign = { name: 'Maren Oduya' };

async function rowOf(id: string) {
  const [row] = await db().select().from(signOffs).where(eq(signOffs.id, id));
  if (!row) throw new Error(`no sign-off ${id}`);
  return row;
}

const revisionOf = async (build: TestBuild) =>
  (await db().select({ revision: builds.diaryRevision }).from(builds).where(eq(builds.id, build.id)))[0]?.revision;

/** The stretches for which a stage of this build waited for its owner, as forecasts read them. */
const waitsOf = async ({ id }: TestBuild) => {
  const signOffsOf = (await unscopedProgress([id])).get(id)?.signOffs ?? [];
  return signOffsOf.map(({ fromMs, toMs, blocksStageKey }) => ({ fromMs, toMs, blocksStageKey }));
};

const mailTo = (viewer: Viewer, kind: 'sign_off' | 'sign_off_answered') =>
  db()
    .select({ about: outbox.about })
    .from(outbox)
    .where(and(eq(outbox.userId, viewer.id), eq(outbox.kind, kind)));

const told = (id: string) =>
  db()
    .select({ action: auditEvents.action, actorId: auditEvents.actorId, reason: auditEvents.reason })
    .from(auditEvents)
    .where(eq(auditEvents.subjectId, id));

const sentence = (work: Promise<unknown>) =>
  work.then(
    () => 'nothing was refused',
    (error: unknown) => {
      if (error instanceof BadInput) return Object.values(error.fields).join(' ');
      if (error instanceof Denied) return error.message;
      throw error;
    },
  );

async function askSpec(build: TestBuild, rep: Viewer, number: number, over: { dueOn?: string } = {}) {
  const versionId = `${build.id}-${number}`;
  await write((tx) =>
    tx.insert(specVersions).values({
      id: versionId,
      buildId: build.id,
      number,
      document: { items: [] },
      contentHash: `${number}`.padEnd(64, 'a'),
      sentById: rep.id,
      sentAt: NOW_MS,
    }),
  );
  const wish = {
    kind: 'spec' as const,
    specVersionId: versionId,
    title: `Spec, version ${number}`,
    message: '',
    dueOn: over.dueOn ?? '2026-12-12',
    blocksStageKey: null,
    contentHash: `${number}`.padEnd(64, 'a'),
  };
  return write((tx) => askForSignOff(tx, rep, build, wish, NOW_MS + number));
}

describe('asking', () => {
  test('puts it before the owner, with one mail, a line in the record and a new state of the diary', async () => {
    const { owner, companion, rep, build } = await signOffCast();
    const before = await revisionOf(build);
    const id = await askDrawing(build, rep);
    expect((await listBuildSignOffs(owner, build.orderNumber)).map((row) => row.id)).toEqual([id]);
    expect(await mailTo(owner, 'sign_off')).toEqual([{ about: { signOffId: id } }]);
    expect(await mailTo(companion, 'sign_off')).toEqual([]);
    expect(await told(id)).toEqual([{ action: 'sign_off_asked', actorId: rep.id, reason: null }]);
    expect(await revisionOf(build)).toBe((before ?? 0) + 1);
  });

  test('for the very same twice is asking once', async () => {
    const { owner, rep, build } = await signOffCast();
    const documentId = await makeDocument(build, rep);
    const first = await askDrawing(build, rep, { documentId });
    expect(await askDrawing(build, rep, { documentId }, NOW_MS + 5)).toBe(first);
    expect(await mailTo(owner, 'sign_off')).toHaveLength(1);
  });

  test.each([
    ['a day that is over', '2026-11-30', 'That day is over. Choose today or a later one.'],
    ['a day more than a year away', '2028-01-01', 'That day is more than a year away. Choose one within the year.'],
    ['a day that never comes', '2027-02-30', 'Choose the day it should be signed by.'],
    ['no day', '', 'Choose the day it should be signed by.'],
    ['a day of another kind', '12/12/2026', 'Choose the day it should be signed by.'],
  ])('by %s is refused at its field', async (_, dueOn, says) => {
    const { rep, build } = await signOffCast();
    await expect(askDrawing(build, rep, { dueOn })).rejects.toThrow(BadInput);
    expect(await sentence(askDrawing(build, rep, { dueOn }))).toBe(says);
  });

  test('by today is taken, as the shop’s clock has it', async () => {
    const { rep, build } = await signOffCast();
    await expect(askDrawing(build, rep, { dueOn: '2026-12-01' })).resolves.toBeTypeOf('string');
    const late = Date.UTC(2026, 11, 2, 0, 30);
    await expect(askDrawing(build, rep, { dueOn: '2026-12-01' }, late)).rejects.toThrow(BadInput);
  });

  test('cannot block a stage that has begun, or that is of another route', async () => {
    const { rep, build } = await signOffCast({ stageKey: 'neck' });
    expect(await sentence(askDrawing(build, rep, { blocksStageKey: 'neck' }))).toMatch(/^Neck & frets has begun/);
    expect(await sentence(askDrawing(build, rep, { blocksStageKey: 'no-such' }))).toMatch(/not on this build’s route/);
    await expect(askDrawing(build, rep, { blocksStageKey: 'finish' })).resolves.toBeTypeOf('string');
  });

  test('is the reps’ alone', async () => {
    const { owner, companion, stranger, builder, admin, build } = await signOffCast();
    for (const viewer of [owner, companion, builder]) await expect(askDrawing(build, viewer)).rejects.toThrow(Denied);
    for (const viewer of [stranger, admin]) await expect(askDrawing(build, viewer)).rejects.toThrow(OutOfReach);
  });

  test('needs somebody who could sign', async () => {
    const { rep, build } = await signOffCast();
    await write((tx) => tx.delete(buildPeople).where(eq(buildPeople.buildId, build.id)));
    expect(await sentence(askDrawing(build, rep))).toMatch(/has no owner yet/);
  });

  test('names exactly one thing', async () => {
    const { rep, build } = await signOffCast();
    const mixed = askDrawing(build, rep, { kind: 'spec' });
    await expect(mixed).rejects.toThrow(RangeError);
    await expect(askDrawing(build, rep, { changeRequestId: 'x' })).rejects.toThrow(RangeError);
  });
});

describe('a change asks again', () => {
  test('a new version takes the place of the one that waits, which can then not be signed', async () => {
    const { owner, rep, build } = await signOffCast();
    const [first, second] = [await askSpec(build, rep, 1), await askSpec(build, rep, 2)];
    expect((await rowOf(first)).state).toBe('superseded');
    expect(await sentence(signSignOff(owner, { signOffId: first, ...sign }, NOW_MS))).toBe(
      '“Spec, version 1” can no longer be signed: “Spec, version 2” has taken its place. Go back to the sign-offs and open that one.',
    );
    expect((await rowOf(first)).signedName).toBeNull();
    await signSignOff(owner, { signOffId: second, ...sign }, NOW_MS);
    expect((await rowOf(second)).state).toBe('signed');
  });

  test('what was signed stays signed, and the chain shows both', async () => {
    const { owner, rep, build } = await signOffCast();
    const first = await askSpec(build, rep, 1);
    await signSignOff(owner, { signOffId: first, ...sign }, NOW_MS);
    const second = await askSpec(build, rep, 2);
    expect((await rowOf(first)).state).toBe('signed');
    const { ofBuild } = await requireSignOff(owner, second);
    expect(chainOf(ofBuild, second).map(({ id }) => id)).toEqual([first, second]);
  });

  test('another drawing of the same item takes its place; one of another item does not', async () => {
    const { rep, build } = await signOffCast();
    const logo = await askDrawing(build, rep, { itemKey: 'logo' });
    const inlay = await askDrawing(build, rep, { itemKey: 'inlay' }, NOW_MS + 1);
    await askDrawing(build, rep, { itemKey: 'logo' }, NOW_MS + 2);
    expect((await rowOf(logo)).state).toBe('superseded');
    expect((await rowOf(inlay)).state).toBe('asked');
  });

  test('a drawing without an item takes the place of the one it is sent for, of the same build only', async () => {
    const { rep, build } = await signOffCast();
    const other = await signOffCast();
    const first = await askDrawing(build, rep);
    const second = await askDrawing(build, rep, { replacesId: first }, NOW_MS + 1);
    expect((await rowOf(first)).state).toBe('superseded');
    expect((await rowOf(second)).replacesId).toBe(first);
    const foreign = await askDrawing(other.build, other.rep);
    expect(await sentence(askDrawing(build, rep, { replacesId: foreign }))).toMatch(/no longer there/);
    expect((await rowOf(foreign)).state).toBe('asked');
  });

  test('the database itself refuses to change what was signed, and what a sign-off is of', async () => {
    const { owner, rep, build } = await signOffCast();
    const open = await askDrawing(build, rep);
    const signed = await askDrawing(build, rep, {}, NOW_MS + 1);
    await signSignOff(owner, { signOffId: signed, ...sign }, NOW_MS);
    const set = (id: string, values: Partial<typeof signOffs.$inferInsert>) =>
      write((tx) => tx.update(signOffs).set(values).where(eq(signOffs.id, id)));
    await expect(set(signed, { state: 'asked' })).rejects.toThrow();
    await expect(set(open, { contentHash: HASH })).rejects.toThrow();
    await expect(set(open, { documentId: await makeDocument(build, rep) })).rejects.toThrow();
  });
});

describe('signing', () => {
  test('records who, when, what by its hash, and from which session', async () => {
    const { owner, rep, build } = await signOffCast();
    const id = await askDrawing(build, rep);
    const before = await revisionOf(build);
    await signSignOff(owner, { signOffId: id, ...sign }, NOW_MS + DAY_MS);
    const row = await rowOf(id);
    expect(row).toMatchObject({
      state: 'signed',
      signedName: 'Maren Oduya',
      answeredById: owner.id,
      answeredAt: NOW_MS + DAY_MS,
      sessionHash: hashToken(owner.sessionId),
    });
    const [session] = await db().select().from(sessions).where(eq(sessions.userId, owner.id));
    expect(hashToken(session?.id ?? '')).toBe(row.sessionHash);
    expect((await told(id)).at(-1)).toEqual({
      action: 'sign_off_signed',
      actorId: owner.id,
      reason: row.contentHash,
    });
    expect(await mailTo(rep, 'sign_off_answered')).toEqual([{ about: { signOffId: id } }]);
    expect(await revisionOf(build)).toBe((before ?? 0) + 1);
  });

  test.each(['Maren Oduya', 'maren oduya', '  MAREN   ODUYA ', 'Maren\u00a0Oduya', 'Ｍaren Oduya'])(
    'takes the name as it is typed: %j',
    async (name) => {
      const { owner, rep, build } = await signOffCast();
      const id = await askDrawing(build, rep);
      await signSignOff(owner, { signOffId: id, name }, NOW_MS);
      expect((await rowOf(id)).signedName).toBe('Maren Oduya');
    },
  );

  test.each([
    ['', 'Type your name to sign.'],
    [' \u00a0 ', 'Type your name to sign.'],
    ['yes', 'Type your name as it stands on your account: Maren Oduya.'],
    ['Maren', 'Type your name as it stands on your account: Maren Oduya.'],
    ['Ruth Adeyemi', 'Type your name as it stands on your account: Maren Oduya.'],
  ])('with %j as a name is refused at its field, and nothing is signed', async (name, says) => {
    const { owner, rep, build } = await signOffCast();
    const id = await askDrawing(build, rep);
    expect(await sentence(signSignOff(owner, { signOffId: id, name }, NOW_MS))).toBe(says);
    expect((await rowOf(id)).state).toBe('asked');
  });

  test('twice is refused with a sentence, also at the same moment', async () => {
    const { owner, rep, build } = await signOffCast();
    const id = await askDrawing(build, rep);
    const both = await Promise.all([
      sentence(signSignOff(owner, { signOffId: id, ...sign }, NOW_MS)),
      sentence(signSignOff(owner, { signOffId: id, ...sign }, NOW_MS + 1)),
    ]);
    expect(both).toEqual([
      'nothing was refused',
      '“Headstock logo, drawing 1” is signed already. Nothing is left to do.',
    ]);
    expect((await rowOf(id)).answeredAt).toBe(NOW_MS);
    expect(await mailTo(rep, 'sign_off_answered')).toHaveLength(1);
  });

  test('as anybody but the owner is refused', async () => {
    const { companion, stranger, rep, builder, admin, build } = await signOffCast();
    const id = await askDrawing(build, rep);
    const attempt = (viewer: typeof rep) => signSignOff(viewer, { signOffId: id, name: viewer.name }, NOW_MS);
    expect(await sentence(attempt(companion))).toBe('Only the owner of this build signs. You are looking on.');
    for (const viewer of [rep, builder])
      expect(await sentence(attempt(viewer))).toBe('Only the owner signs. Nobody of the shop can do it for them.');
    for (const viewer of [stranger, admin]) await expect(attempt(viewer)).rejects.toThrow(OutOfReach);
    expect((await rowOf(id)).state).toBe('asked');
  });

  test('what was taken back is refused', async () => {
    const { owner, rep, build } = await signOffCast();
    const id = await askDrawing(build, rep);
    await withdrawSignOff(rep, id, NOW_MS);
    expect(await sentence(signSignOff(owner, { signOffId: id, ...sign }, NOW_MS))).toMatch(/taken this back/);
  });

  test('an offer settles the change request, and an offer that no longer stands cannot be signed', async () => {
    const { owner, rep, build } = await signOffCast();
    const row = { buildId: build.id, itemKey: 'logo', wish: 'Gold leaf', askedById: owner.id, priceCents: 9000 };
    const ask = async (id: string, state: 'offered' | 'declined') => {
      await write((tx) => tx.insert(changeRequests).values({ ...row, id, state, extraDays: 2, createdAt: NOW_MS }));
      const wish = { title: 'Change', message: '', dueOn: '2026-12-12', blocksStageKey: null, contentHash: HASH };
      return write((tx) => askForSignOff(tx, rep, build, { kind: 'change', changeRequestId: id, ...wish }, NOW_MS));
    };
    const good = await ask(`${build.id}-c1`, 'offered');
    const gone = await ask(`${build.id}-c2`, 'declined');
    await signSignOff(owner, { signOffId: good, ...sign }, NOW_MS);
    const [settled] = await db()
      .select()
      .from(changeRequests)
      .where(eq(changeRequests.id, `${build.id}-c1`));
    expect(settled?.state).toBe('signed');
    expect(await sentence(signSignOff(owner, { signOffId: gone, ...sign }, NOW_MS))).toMatch(/no longer stands/);
    expect((await rowOf(gone)).state).toBe('asked');
  });
});

describe('asking for a change', () => {
  test('keeps the owner’s words, tells the rep, and ends the owner’s part', async () => {
    const { owner, rep, build } = await signOffCast();
    const id = await askDrawing(build, rep);
    await askForChange(owner, { signOffId: id, words: 'The R is too wide.' }, NOW_MS);
    expect(await rowOf(id)).toMatchObject({ state: 'change_asked', answer: 'The R is too wide.', signedName: null });
    expect(await mailTo(rep, 'sign_off_answered')).toHaveLength(1);
    expect((await findShell(owner)).signOffs).toBe(0);
    expect((await findShell(rep)).signOffs).toBe(1);
    expect(await sentence(signSignOff(owner, { signOffId: id, ...sign }, NOW_MS))).toMatch(/^You asked for a change/);
  });

  test('is the owner’s alone', async () => {
    const { companion, rep, build } = await signOffCast();
    const id = await askDrawing(build, rep);
    for (const viewer of [companion, rep])
      await expect(askForChange(viewer, { signOffId: id, words: 'Other' }, NOW_MS)).rejects.toThrow(Denied);
  });
});

describe('taking back', () => {
  test('hides it from its owner and it was no wait; twice is once; staff still find it', async () => {
    const { owner, rep, build } = await signOffCast();
    const id = await askDrawing(build, rep, { blocksStageKey: 'finish' });
    await withdrawSignOff(rep, id, NOW_MS + 5);
    await withdrawSignOff(rep, id, NOW_MS + 9);
    expect(await listBuildSignOffs(owner, build.orderNumber)).toEqual([]);
    await expect(requireSignOff(owner, id)).rejects.toThrow(OutOfReach);
    expect((await requireSignOff(rep, id)).state).toBe('withdrawn');
    expect(await waitsOf(build)).toEqual([]);
  });

  test('is refused for what is signed, and to anybody but a rep', async () => {
    const { owner, builder, rep, build } = await signOffCast();
    const id = await askDrawing(build, rep);
    for (const viewer of [owner, builder]) await expect(withdrawSignOff(viewer, id, NOW_MS)).rejects.toThrow(Denied);
    await signSignOff(owner, { signOffId: id, ...sign }, NOW_MS);
    expect(await sentence(withdrawSignOff(rep, id, NOW_MS))).toMatch(/is signed, and stays so/);
  });
});

describe('who reads', () => {
  test('the owner and the assigned staff, nobody else', async () => {
    const { owner, companion, stranger, rep, builder, admin, build } = await signOffCast();
    const id = await askDrawing(build, rep);
    for (const viewer of [owner, rep, builder]) {
      expect((await requireSignOff(viewer, id)).id).toBe(id);
      expect((await findSubject(viewer, await requireSignOff(viewer, id))).document?.title).toBe('Headstock logo');
      expect((await listWaitingSignOffs(viewer, [build.id])).map((row) => row.id)).toEqual([id]);
    }
    for (const viewer of [companion, stranger, admin]) {
      await expect(requireSignOff(viewer, id)).rejects.toThrow(OutOfReach);
      expect((await listSignOffQueue(viewer, null)).signOffs).toEqual([]);
      expect(await listWaitingSignOffs(viewer, [build.id])).toEqual([]);
      expect((await findShell(viewer)).signOffs).toBe(0);
    }
    await expect(listBuildSignOffs(companion, build.orderNumber)).rejects.toThrow(Denied);
    await expect(listBuildSignOffs(stranger, build.orderNumber)).rejects.toThrow(OutOfReach);
  });

  test('staff are told whose it is, its owner is not told their own name', async () => {
    const { owner, rep, build } = await signOffCast();
    await askDrawing(build, rep);
    expect((await listWaitingSignOffs(rep, [build.id]))[0]?.ownerName).toBe('Maren Oduya');
    expect((await listWaitingSignOffs(owner, [build.id]))[0]?.ownerName).toBeNull();
  });

  test('the queue goes by the day to sign by, over all builds, page after page without a gap', async () => {
    const rep = await signedIn(await makePerson('rep'));
    const owner = await makePerson('buyer');
    const build = await makeBuild({ owner, staff: [{ person: rep }] });
    const days = Array.from({ length: 70 }, (_, i) => `2026-12-${String(1 + ((i * 7) % 28)).padStart(2, '0')}`);
    for (const dueOn of days) await askDrawing(build, rep, { dueOn });
    const first = await listSignOffQueue(rep, null);
    const second = await listSignOffQueue(rep, parseSignOffPlace(first.next));
    const all = [...first.signOffs, ...second.signOffs];
    expect(all.map(({ dueOn }) => dueOn)).toEqual([...days].sort());
    expect(new Set(all.map(({ id }) => id)).size).toBe(70);
    expect(second.next).toBeNull();
  });

  test('a place that was made up is no place', () => {
    for (const place of ['', '2026-12-01', "2026-12-01.' or 1", '1.x', null, ['2026-12-01.a']])
      expect(parseSignOffPlace(place)).toBeNull();
  });
});

describe('the time a build waits for its owner', () => {
  test('runs from asking to the answer, and goes on with what takes its place', async () => {
    const { owner, rep, build } = await signOffCast();
    const first = await askDrawing(build, rep, { blocksStageKey: 'finish' });
    await askForChange(owner, { signOffId: first, words: 'Wider' }, NOW_MS + DAY_MS);
    await askDrawing(build, rep, { replacesId: first, blocksStageKey: 'finish' }, NOW_MS + 3 * DAY_MS);
    expect(await waitsOf(build)).toEqual([
      { fromMs: NOW_MS, toMs: NOW_MS + DAY_MS, blocksStageKey: 'finish' },
      { fromMs: NOW_MS + 3 * DAY_MS, toMs: null, blocksStageKey: 'finish' },
    ]);
  });

  test('ends for one that was superseded when the next was asked', async () => {
    const { rep, build } = await signOffCast();
    const first = await askDrawing(build, rep, { blocksStageKey: 'finish' });
    await askDrawing(build, rep, { replacesId: first, blocksStageKey: 'finish' }, NOW_MS + DAY_MS);
    expect((await waitsOf(build)).map(({ toMs }) => toMs)).toEqual([NOW_MS + DAY_MS, null]);
  });
});
