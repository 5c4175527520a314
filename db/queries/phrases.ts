import { and, asc, count, desc, eq, isNotNull, isNull, or, sql } from 'drizzle-orm';
import { unscopedCalendar } from './calendar';
import { requireReachable } from './question-reach';
import { requireCan } from './standing';
import { db, write } from '../client';
import { builds, buildStages, questions, readyWindows, savedPhrases, users } from '../schema';
import { can } from '@/lib/access';
import { BadInput, OutOfReach } from '@/lib/errors';
import { firstName } from '@/lib/questions/people-words';
import type { PhraseValues } from '@/lib/questions/phrases';
import { dayOf } from '@/lib/schedule/calendar';
import { windowWords } from '@/lib/schedule/window-words';
import type { SavedPhrase } from '@/lib/validation/questions';
import type { Viewer } from '@/lib/viewer';

const MOST_PHRASES = 200;

const isReadable = (viewer: Viewer) => or(eq(savedPhrases.ownerId, viewer.id), isNull(savedPhrases.ownerId));

/** The viewer's own phrases and the shop's, by name. @throws OutOfReach for the client side */
export async function listPhrases(viewer: Viewer) {
  await requireCan(viewer, 'phrase.keep');
  const rows = await db()
    .select({
      id: savedPhrases.id,
      ownerId: savedPhrases.ownerId,
      title: savedPhrases.title,
      words: savedPhrases.words,
    })
    .from(savedPhrases)
    .where(isReadable(viewer))
    .orderBy(sql`${savedPhrases.ownerId} is null`, asc(savedPhrases.title), asc(savedPhrases.id))
    .limit(2 * MOST_PHRASES);
  return rows.map(({ ownerId, ...phrase }) => ({ ...phrase, whose: ownerId === null ? 'shop' : 'mine' }) as const);
}

export type PhraseRow = Awaited<ReturnType<typeof listPhrases>>[number];

/** Which phrases the viewer may change: their own, and the shop's as a rep. */
function isEditable(viewer: Viewer, phraseId: string) {
  const own = eq(savedPhrases.ownerId, viewer.id);
  const mayShop = can(viewer.role, 'none', 'phrase.keep_shop');
  return and(eq(savedPhrases.id, phraseId), mayShop ? or(own, isNull(savedPhrases.ownerId)) : own);
}

/**
 * Keeps a phrase, new or changed.
 * @throws OutOfReach for a phrase that is not the viewer's to change; BadInput for too many, or the shop's by a builder
 */
export function savePhrase(viewer: Viewer, { phraseId, title, words, whose }: SavedPhrase): Promise<void> {
  return write(async (tx) => {
    await requireCan(viewer, 'phrase.keep');
    if (whose === 'shop' && !can(viewer.role, 'none', 'phrase.keep_shop'))
      throw new BadInput({ whose: 'The shop’s phrases are kept by the reps. Keep it as your own.' });
    const ownerId = whose === 'shop' ? null : viewer.id;
    if (phraseId !== '') {
      const [changed] = await tx
        .update(savedPhrases)
        .set({ title, words, ownerId })
        .where(isEditable(viewer, phraseId))
        .returning({ id: savedPhrases.id });
      if (!changed) throw new OutOfReach();
      return;
    }
    const [kept] = await tx
      .select({ n: count() })
      .from(savedPhrases)
      .where(ownerId === null ? isNull(savedPhrases.ownerId) : eq(savedPhrases.ownerId, ownerId));
    if ((kept?.n ?? 0) >= MOST_PHRASES)
      throw new BadInput({ title: `There are ${MOST_PHRASES} phrases already. Take one away first.` });
    await tx.insert(savedPhrases).values({ ownerId, title, words });
  });
}

/** Takes a phrase away; one that is gone, or is not the viewer's to change, stays as it is. @throws OutOfReach for clients */
export function dropPhrase(viewer: Viewer, phraseId: string): Promise<void> {
  return write(async (tx) => {
    await requireCan(viewer, 'phrase.keep');
    await tx.delete(savedPhrases).where(isEditable(viewer, phraseId));
  });
}

/** What the fields of a phrase stand for in a letter about this question. @throws OutOfReach */
export async function findPhraseValues(viewer: Viewer, questionId: string, nowMs: number): Promise<PhraseValues> {
  const { buildId } = await requireReachable(viewer, questionId);
  const [row] = await db()
    .select({ owner: users.name, instrument: builds.instrument, order: builds.orderNumber })
    .from(questions)
    .innerJoin(builds, eq(builds.id, questions.buildId))
    .innerJoin(users, eq(users.id, questions.askedById))
    .where(eq(questions.id, questionId));
  if (!row) throw new OutOfReach();
  const [stage, window] = await Promise.all([stageNow(buildId), windowNow(buildId, nowMs)]);
  return { ...row, owner: firstName(row.owner), stage, window };
}

async function stageNow(buildId: string): Promise<string | null> {
  const [stage] = await db()
    .select({ name: buildStages.name })
    .from(buildStages)
    .where(and(eq(buildStages.buildId, buildId), isNotNull(buildStages.startedAt), isNull(buildStages.finishedAt)))
    .orderBy(asc(buildStages.position))
    .limit(1);
  return stage?.name ?? null;
}

async function windowNow(buildId: string, nowMs: number): Promise<string | null> {
  const { zone } = await unscopedCalendar();
  const [given] = await db()
    .select({ kind: readyWindows.kind, earliestOn: readyWindows.earliestOn, latestOn: readyWindows.latestOn })
    .from(readyWindows)
    .where(eq(readyWindows.buildId, buildId))
    .orderBy(desc(readyWindows.givenOn))
    .limit(1);
  const { kind, earliestOn, latestOn } = given ?? { kind: 'unsayable', earliestOn: null, latestOn: null };
  if (kind !== 'window' || earliestOn === null || latestOn === null) return null;
  return windowWords({ kind, earliestOn, latestOn }, dayOf(nowMs, zone));
}
