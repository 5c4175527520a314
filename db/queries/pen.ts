import { and, asc, eq, gt, inArray, isNull, lte, ne, or, type SQL } from 'drizzle-orm';
import { alias } from 'drizzle-orm/sqlite-core';
import { openRouter, type Router } from './answerers';
import { queueMail } from './outbox';
import { lastLetterOf } from './question-clock';
import { requireReachable, type ReachedQuestion } from './question-reach';
import { requireCan } from './standing';
import { db, write, type Tx } from '../client';
import { penPasses, questions, topics, users } from '../schema';
import { newId } from '../schema/columns';
import { can, isStaffRole } from '@/lib/access';
import { BadInput, Denied } from '@/lib/errors';
import { routeWords } from '@/lib/questions/route-question';
import type { PenPass } from '@/lib/validation/questions';
import type { Viewer } from '@/lib/viewer';

type Pass = { questionId: string; fromId: string | null; toId: string | null; byId: string | null; reason: string };

/** Writes down that the pen went over, and returns the id of that. */
export async function recordPass(tx: Tx, pass: Pass, nowMs: number): Promise<string> {
  const id = newId();
  await tx.insert(penPasses).values({ id, ...pass, passedAt: nowMs });
  return id;
}

/** Whether the viewer may give the pen away: who holds it, and any rep. What `passPen` decides again. */
export const mayPass = (viewer: Viewer, { penHolderId }: { penHolderId: string | null }): boolean =>
  can(viewer.role, 'assigned', 'pen.pass_any') ||
  (can(viewer.role, 'assigned', 'pen.pass') && penHolderId === viewer.id);

const mayHold = ({ topic }: ReachedQuestion, { role }: { role: string }) => !(topic.repsOnly && role === 'builder');

/**
 * Gives the pen to somebody else on the build, who is told by mail, with a reason that the shop can read.
 * @throws OutOfReach, Denied for who does not hold it, or BadInput for somebody who could not answer
 */
export function passPen(viewer: Viewer, questionId: string, { toId, reason }: PenPass, nowMs: number): Promise<void> {
  return write(async (tx) => {
    const question = await requireReachable(viewer, questionId, tx);
    await requireCan(viewer, 'pen.pass', question.orderNumber, tx);
    if (!mayPass(viewer, question))
      throw new Denied('not_allowed', 'Somebody else holds the pen on this question. Ask your rep to pass it to you.');
    if (question.state === 'closed')
      throw new Denied('conflict', 'This question is closed. Open it again before you pass the pen.');
    if (toId === question.penHolderId) throw new BadInput({ toId: 'They hold the pen already. Choose somebody else.' });
    const { onBuild } = await openRouter(tx, question.buildId, nowMs);
    const next = onBuild.find(({ id }) => id === toId);
    if (!next || !mayHold(question, next))
      throw new BadInput({ toId: 'They cannot read this question. Choose somebody from the list.' });
    const from = { questionId, fromId: question.penHolderId };
    const passId = await recordPass(tx, { ...from, toId, byId: viewer.id, reason }, nowMs);
    await giveTo(tx, question, toId, passId, nowMs);
  });
}

type Given = Pick<ReachedQuestion, 'id' | 'state'>;

/** Moves the pen, and tells its new holder where somebody waits for them. */
async function giveTo(tx: Tx, { id, state }: Given, toId: string | null, passId: string, nowMs: number): Promise<void> {
  await tx.update(questions).set({ penHolderId: toId }).where(eq(questions.id, id));
  if (toId === null || state !== 'waiting') return;
  const about = { questionId: id, letterId: await lastLetterOf(tx, id) };
  await queueMail(tx, { kind: 'question', userId: toId, about, dedupeKey: `pen/${passId}` }, nowMs);
}

/**
 * Looks again at who holds the pen of the open questions of a build or of a person, after something changed about who
 * reaches it. Whoever can still answer keeps it; otherwise it is routed anew, and nobody's pen finds somebody.
 */
export async function routeAgain(tx: Tx, which: { buildId?: string; holderId?: string }, nowMs: number): Promise<void> {
  const ofBuild = which.buildId === undefined ? undefined : eq(questions.buildId, which.buildId);
  const ofHolder = which.holderId === undefined ? undefined : eq(questions.penHolderId, which.holderId);
  await routeEach(tx, and(ofBuild, ofHolder), nowMs);
}

async function routeEach(tx: Tx, which: SQL | undefined, nowMs: number): Promise<void> {
  const open = await tx
    .select({
      id: questions.id,
      buildId: questions.buildId,
      state: questions.state,
      penHolderId: questions.penHolderId,
      topic: { answeredBy: topics.answeredBy, department: topics.department, repsOnly: topics.repsOnly },
    })
    .from(questions)
    .innerJoin(topics, eq(topics.id, questions.topicId))
    .where(and(which, ne(questions.state, 'closed')))
    .orderBy(asc(questions.buildId), asc(questions.createdAt));
  const routers = new Map<string, Router>();
  for (const question of open) {
    const router = routers.get(question.buildId) ?? (await openRouter(tx, question.buildId, nowMs));
    routers.set(question.buildId, router);
    const holder = router.onBuild.find(({ id }) => id === question.penHolderId);
    if (holder && !holder.isAway && !(question.topic.repsOnly && holder.role === 'builder')) continue;
    const route = router.route(question.topic);
    const toId = route.holder?.id ?? (holder ? holder.id : null);
    if (toId === question.penHolderId) continue;
    const pass = { questionId: question.id, fromId: question.penHolderId, toId, byId: null };
    const passId = await recordPass(tx, { ...pass, reason: routeWords(route) }, nowMs);
    await giveTo(tx, question, toId, passId, nowMs);
  }
}

/** Finds answerers for what waits on somebody who is out of office now, or on nobody. For the clock's job. */
export function routeAwayAgain(nowMs: number): Promise<void> {
  return write(async (tx) => {
    const away = tx
      .select({ id: users.id })
      .from(users)
      .where(and(lte(users.awayFromAt, nowMs), or(isNull(users.awayUntilAt), gt(users.awayUntilAt, nowMs))));
    const isStuck = or(isNull(questions.penHolderId), inArray(questions.penHolderId, away));
    await routeEach(tx, and(eq(questions.state, 'waiting'), isStuck), nowMs);
  });
}

const passer = alias(users, 'passer');
const giver = alias(users, 'giver');
const taker = alias(users, 'taker');

/** How the pen went from hand to hand, oldest first; the shop's own. @throws OutOfReach or Denied */
export async function listPenPasses(viewer: Viewer, questionId: string) {
  const question = await requireReachable(viewer, questionId);
  await requireCan(viewer, 'margin.read', question.orderNumber);
  return db()
    .select({
      id: penPasses.id,
      from: giver.name,
      to: taker.name,
      by: passer.name,
      reason: penPasses.reason,
      passedAt: penPasses.passedAt,
    })
    .from(penPasses)
    .leftJoin(giver, eq(giver.id, penPasses.fromId))
    .leftJoin(taker, eq(taker.id, penPasses.toId))
    .leftJoin(passer, eq(passer.id, penPasses.byId))
    .where(eq(penPasses.questionId, questionId))
    .orderBy(asc(penPasses.passedAt), asc(penPasses.id))
    .limit(100);
}

export type PenPassRow = Awaited<ReturnType<typeof listPenPasses>>[number];

/** Who could take the pen of a question now. Empty for whoever may not pass it. @throws OutOfReach */
export async function listPenTakers(viewer: Viewer, questionId: string, nowMs: number) {
  const question = await requireReachable(viewer, questionId);
  if (!isStaffRole(viewer.role) || !mayPass(viewer, question) || question.state === 'closed') return [];
  const { onBuild } = await openRouter(db(), question.buildId, nowMs);
  return onBuild
    .filter((person) => person.id !== question.penHolderId && mayHold(question, person))
    .map(({ id, name, role, department, isAway }) => ({ id, name, role, department, isAway }));
}

export type PenTaker = Awaited<ReturnType<typeof listPenTakers>>[number];
