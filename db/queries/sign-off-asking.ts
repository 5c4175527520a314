import { and, desc, eq, inArray, ne, or, sql, type SQL } from 'drizzle-orm';
import { recordEvent } from './audit';
import { touchDiary } from './builds';
import { shopDay } from './calendar';
import { queueMail } from './outbox';
import { listOwnerIds } from './owners';
import { requireCan } from './standing';
import type { Tx } from '../client';
import { buildStages, signOffs } from '../schema';
import { BadInput, Denied } from '@/lib/errors';
import { dueDayProblem } from '@/lib/sign-offs/due-day';
import { requireOneSubject, type SignOffSubject } from '@/lib/sign-offs/subject';
import type { Viewer } from '@/lib/viewer';

export type SignOffWish = SignOffSubject & {
  title: string;
  /** The rep's words to the owner; may be empty. */
  message: string;
  /** yyyy-mm-dd in the shop's zone. */
  dueOn: string;
  /** The stage that waits for it, by key; null when none does. */
  blocksStageKey: string | null;
  /** SHA-256 of what is signed, hex. */
  contentHash: string;
  /** An earlier sign-off whose place this one takes, where the subject does not tell. */
  replacesId?: string;
};

type Build = { id: string; orderNumber: string };

/**
 * Puts one thing before the owner to be signed, in the transaction of what made it. An earlier sign-off of the same
 * thing that is still open is superseded, a signed one stays signed; asking for the very same twice is asking once.
 * @returns the sign-off's id
 * @throws OutOfReach, Denied, or BadInput with a sentence for `dueOn`, `blocksStageKey` or `replacesId`
 */
export async function askForSignOff(
  tx: Tx,
  viewer: Viewer,
  build: Build,
  wish: SignOffWish,
  nowMs: number,
): Promise<string> {
  await requireCan(viewer, 'sign_off.ask', build.orderNumber, tx);
  requireOneSubject(wish);
  await requireDueDay(tx, wish.dueOn, nowMs);
  await requireStageAhead(tx, build.id, wish.blocksStageKey);
  const owners = await requireOwners(tx, build.id);
  const earlier = await findEarlier(tx, build.id, wish);
  if (earlier && isTheSame(earlier, wish)) return earlier.id;
  if (earlier) await supersede(tx, build.id, earlier.id, wish, nowMs);
  const [asked] = await tx
    .insert(signOffs)
    .values({
      ...wish,
      buildId: build.id,
      replacesId: earlier?.id ?? null,
      state: 'asked',
      askedById: viewer.id,
      askedAt: nowMs,
    })
    .returning({ id: signOffs.id });
  if (!asked) throw new Error('an insert without a row');
  for (const userId of owners) {
    const about = { signOffId: asked.id };
    await queueMail(tx, { kind: 'sign_off', userId, about, dedupeKey: `sign_off/${asked.id}/${userId}` }, nowMs);
  }
  const event = { actorId: viewer.id, action: 'sign_off_asked', buildId: build.id, subjectId: asked.id } as const;
  await recordEvent(tx, event, nowMs);
  await touchDiary(tx, build.id);
  return asked.id;
}

async function requireDueDay(tx: Tx, dueOn: string, nowMs: number): Promise<void> {
  const problem = dueDayProblem(dueOn, await shopDay(nowMs, tx));
  if (problem) throw new BadInput({ dueOn: problem });
}

async function requireStageAhead(tx: Tx, buildId: string, stageKey: string | null): Promise<void> {
  if (stageKey === null) return;
  const [stage] = await tx
    .select({ name: buildStages.name, startedAt: buildStages.startedAt })
    .from(buildStages)
    .where(and(eq(buildStages.buildId, buildId), eq(buildStages.key, stageKey)));
  if (!stage)
    throw new BadInput({ blocksStageKey: 'That stage is not on this build’s route. Choose one from the list.' });
  if (stage.startedAt !== null)
    throw new BadInput({
      blocksStageKey: `${stage.name} has begun, so nothing can hold it up. Choose a later stage, or none.`,
    });
}

async function requireOwners(tx: Tx, buildId: string): Promise<string[]> {
  const owners = await listOwnerIds(tx, buildId);
  if (owners.length === 0)
    throw new Denied('conflict', 'Nobody could sign this: the build has no owner yet. Put its owner on it first.');
  return owners;
}

const isDocument = inArray(signOffs.kind, ['drawing', 'sample']);

/** Sign-offs of the same thing: every version of a spec is, as are all drawings of one spec item. */
function sameThing(wish: SignOffWish): SQL | undefined {
  if (wish.kind === 'spec') return eq(signOffs.kind, 'spec');
  if (wish.kind === 'change') return eq(signOffs.changeRequestId, wish.changeRequestId ?? '');
  const item = wish.itemKey ? eq(signOffs.itemKey, wish.itemKey) : undefined;
  if (wish.kind === 'concession') return and(eq(signOffs.kind, 'concession'), item);
  return and(isDocument, item ?? eq(signOffs.documentId, wish.documentId ?? ''));
}

async function findEarlier(tx: Tx, buildId: string, wish: SignOffWish) {
  const [earlier] = await tx
    .select({
      id: signOffs.id,
      state: signOffs.state,
      title: signOffs.title,
      message: signOffs.message,
      contentHash: signOffs.contentHash,
      dueOn: signOffs.dueOn,
      blocksStageKey: signOffs.blocksStageKey,
    })
    .from(signOffs)
    .where(
      and(
        eq(signOffs.buildId, buildId),
        ne(signOffs.state, 'withdrawn'),
        wish.replacesId ? and(eq(signOffs.id, wish.replacesId), isDocument) : sameThing(wish),
      ),
    )
    .orderBy(desc(signOffs.askedAt), desc(sql`${signOffs}.rowid`))
    .limit(1);
  if (wish.replacesId && !earlier)
    throw new BadInput({ replacesId: 'What this was to take the place of is no longer there. Send it by itself.' });
  return earlier ?? null;
}

type Earlier = NonNullable<Awaited<ReturnType<typeof findEarlier>>>;

function isTheSame(earlier: Earlier, wish: SignOffWish): boolean {
  return (
    earlier.state === 'asked' &&
    earlier.contentHash === wish.contentHash &&
    earlier.title === wish.title &&
    earlier.message === wish.message &&
    earlier.dueOn === wish.dueOn &&
    earlier.blocksStageKey === wish.blocksStageKey
  );
}

async function supersede(tx: Tx, buildId: string, earlierId: string, wish: SignOffWish, nowMs: number): Promise<void> {
  const ofThisThing = or(eq(signOffs.id, earlierId), sameThing(wish));
  await tx
    .update(signOffs)
    .set({ state: 'superseded', answeredAt: sql`coalesce(${signOffs.answeredAt}, ${nowMs})` })
    .where(and(eq(signOffs.buildId, buildId), inArray(signOffs.state, ['asked', 'change_asked']), ofThisThing));
}
