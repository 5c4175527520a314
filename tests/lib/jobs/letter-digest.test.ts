import { eq } from 'drizzle-orm';
import { beforeEach, expect, test } from 'vitest';
import { db, write } from '@/db/client';
import { claimDueReaders, writeDigests } from '@/db/queries/digests';
import { sendLetterNow } from '@/db/queries/letters';
import { saveChoices } from '@/db/queries/mail-choices';
import { saveMailSettings } from '@/db/queries/mail-settings';
import { queueMail } from '@/db/queries/outbox';
import { builds, mailSettings } from '@/db/schema';
import { newId } from '@/db/schema/columns';
import { previewDigest } from '@/lib/jobs/preview-digest';
import { CORRECTABLE_MS } from '@/lib/questions/thread-rules';
import { askOn, openThread, writeOn } from '../../support/question-world';
import { DAY_MS, NOW_MS } from '../../support/world';
import { clock, openStandIns, runJobs } from './stand-ins';

const { mailsTo, behave } = await openStandIns();

beforeEach(async () => {
  await behave();
  clock.nowMs = NOW_MS;
});

/** An owner who is told of answers in the digest, and an answer written at `atMs`. */
async function answered(cadence: 'at_once' | 'daily', atMs: number) {
  const thread = await openThread();
  const { owner, builder, build } = thread;
  await saveMailSettings(owner, { cadence, hourLocal: 9, weekday: 1 }, 'UTC', NOW_MS - DAY_MS);
  await runJobs(NOW_MS);
  await saveChoices(owner, [{ kind: 'letter', choice: 'digest' }]);
  const { id } = await askOn(build, owner);
  const letter = await writeOn(builder, id, atMs);
  return { ...thread, letterId: letter.id };
}

test('a letter is not told by a digest while it can be corrected, and by the next one once', async () => {
  const nineTomorrow = NOW_MS + DAY_MS;
  const { owner } = await answered('daily', nineTomorrow - CORRECTABLE_MS + 1);
  await runJobs(nineTomorrow);
  expect(await mailsTo(owner)).toEqual([]);
  expect(await previewDigest(owner, nineTomorrow)).toBeNull();
  await runJobs(nineTomorrow + DAY_MS);
  await runJobs(nineTomorrow + 2 * DAY_MS);
  expect(await mailsTo(owner)).toHaveLength(1);
});

test('who gets digests at once gets it when the two minutes are over', async () => {
  const { owner } = await answered('at_once', NOW_MS);
  await runJobs(NOW_MS + CORRECTABLE_MS - 1);
  expect(await mailsTo(owner)).toEqual([]);
  await runJobs(NOW_MS + CORRECTABLE_MS);
  expect(await mailsTo(owner)).toHaveLength(1);
});

test('a digest of other things in between does not lose it', async () => {
  const { owner } = await answered('at_once', NOW_MS);
  const wakeNow = { nextDigestAt: NOW_MS + 1000 };
  await db().update(mailSettings).set(wakeNow).where(eq(mailSettings.userId, owner.id));
  await runJobs(NOW_MS + 1000);
  expect(await mailsTo(owner)).toEqual([]);
  await runJobs(NOW_MS + CORRECTABLE_MS);
  expect(await mailsTo(owner)).toHaveLength(1);
});

test('what happens while a digest is being written is told by the next look', async () => {
  const { owner, build } = await answered('at_once', NOW_MS);
  clock.nowMs = NOW_MS + CORRECTABLE_MS;
  const [due] = await claimDueReaders('mine', clock.nowMs, 60_000, 1);
  if (due?.viewer.id !== owner.id) throw new Error('not due');
  await saveChoices(owner, [{ kind: 'ready', choice: 'digest' }]);
  await write(async (tx) => {
    await tx.update(builds).set({ readyAt: clock.nowMs }).where(eq(builds.id, build.id));
    const ready = { kind: 'ready', userId: owner.id, about: { buildId: build.id }, dedupeKey: newId() } as const;
    await queueMail(tx, ready, clock.nowMs + 1);
  });
  await writeDigests('mine', [{ due, entryIds: [], newsIds: [] }], clock.nowMs + 2);
  await runJobs(clock.nowMs + 10);
  expect((await mailsTo(owner)).map(({ text }) => text.includes('Nightjar is ready'))).toEqual([true]);
});

test('a letter that its writer lets go is told at once', async () => {
  const { owner, builder, letterId } = await answered('at_once', NOW_MS);
  await sendLetterNow(builder, letterId, NOW_MS + 5000);
  await runJobs(NOW_MS + 5000);
  expect(await mailsTo(owner)).toHaveLength(1);
});
