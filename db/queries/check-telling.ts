import { and, eq, isNotNull } from 'drizzle-orm';
import { recordEvent } from './audit';
import { touchDiary } from './builds';
import { tellReaders } from './entries';
import { requireCan } from './standing';
import { write, type Tx } from '../client';
import { checkRuns, entries } from '../schema';
import { Denied, OutOfReach } from '@/lib/errors';
import { checkNote } from '@/lib/rich-text/check';
import { plainNote } from '@/lib/rich-text/plain-text';
import { BadInput } from '@/lib/errors';
import type { Viewer } from '@/lib/viewer';

async function requireFailed(tx: Tx, buildId: string, runId: string) {
  const [run] = await tx
    .select({ id: checkRuns.id, telling: checkRuns.telling, stageId: checkRuns.backToStageId })
    .from(checkRuns)
    .where(and(eq(checkRuns.id, runId), eq(checkRuns.buildId, buildId), isNotNull(checkRuns.telling)));
  if (!run?.stageId) throw new OutOfReach();
  return { ...run, stageId: run.stageId };
}

type Telling = { orderNumber: string; runId: string; words: string };

/**
 * Tells the player of a failed inspection in the rep's words: an entry in the stage the build went back to. Telling twice is
 * telling once. @throws OutOfReach, Denied when it was kept in the shop, or BadInput for words that cannot be stored
 */
export function tellOfCheck(viewer: Viewer, { orderNumber, runId, words }: Telling, nowMs: number): Promise<void> {
  const note = checkNote(plainNote(words));
  if (!note.ok) return Promise.reject(new BadInput({ words: note.message }));
  return write(async (tx) => {
    const build = await requireCan(viewer, 'check.tell', orderNumber, tx);
    const run = await requireFailed(tx, build.id, runId);
    if (run.telling === 'told') return;
    if (run.telling === 'kept') throw keptAlready();
    const [entry] = await tx
      .insert(entries)
      .values({
        buildId: build.id,
        stageId: run.stageId,
        authorId: viewer.id,
        body: JSON.stringify(note.doc),
        bodyText: note.text,
        audience: 'buyer',
        state: 'published',
        datedAt: nowMs,
        createdAt: nowMs,
        idempotencyKey: `check-${run.id}`,
      })
      .returning({ id: entries.id });
    if (!entry) throw new Error('an insert without a row');
    await tellReaders(tx, build.id, entry.id, nowMs);
    await decide(tx, viewer, build.id, run.id, { telling: 'told', toldWords: note.text }, nowMs);
  });
}

/** Keeps a failed inspection in the shop. Keeping twice is keeping once. @throws OutOfReach, or Denied once it was told */
export function keepCheck(
  viewer: Viewer,
  { orderNumber, runId }: Omit<Telling, 'words'>,
  nowMs: number,
): Promise<void> {
  return write(async (tx) => {
    const build = await requireCan(viewer, 'check.tell', orderNumber, tx);
    const run = await requireFailed(tx, build.id, runId);
    if (run.telling === 'kept') return;
    if (run.telling === 'told')
      throw new Denied('conflict', 'The player has been told. Withdraw the entry if it should not stand.');
    await decide(tx, viewer, build.id, run.id, { telling: 'kept' }, nowMs);
  });
}

const keptAlready = () =>
  new Denied('conflict', 'It was decided to keep this in the shop. Post an entry if the player should know after all.');

type Decision = { telling: 'told'; toldWords: string } | { telling: 'kept' };

async function decide(tx: Tx, viewer: Viewer, buildId: string, runId: string, decision: Decision, nowMs: number) {
  await tx
    .update(checkRuns)
    .set({ ...decision, decidedById: viewer.id, decidedAt: nowMs })
    .where(eq(checkRuns.id, runId));
  const action = decision.telling === 'told' ? 'check_told' : 'check_kept';
  await recordEvent(tx, { actorId: viewer.id, action, buildId, subjectId: runId }, nowMs);
  await touchDiary(tx, buildId);
}
