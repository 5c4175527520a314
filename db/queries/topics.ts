import { and, asc, count, desc, eq, inArray, isNull, max, ne } from 'drizzle-orm';
import { routeAgain } from './pen';
import { requireCan } from './standing';
import { db, write, type Tx } from '../client';
import { builds, departments, questions, shop, topics, users } from '../schema';
import { newId } from '../schema/columns';
import { BadInput, OutOfReach } from '@/lib/errors';
import type { TopicForm } from '@/lib/validation/questions';
import type { Viewer } from '@/lib/viewer';

const MOST_TOPICS = 40;

/** Everything about who answers what, as the admin sets it up. @throws OutOfReach for anybody else */
export async function findTopicSetUp(viewer: Viewer) {
  await requireCan(viewer, 'shop.set_up');
  const [list, places, staff, [row], stuck] = await Promise.all([
    db().select().from(topics).orderBy(asc(topics.position), asc(topics.name)).limit(MOST_TOPICS),
    db()
      .select({ key: departments.key, name: departments.name, leadId: departments.leadId })
      .from(departments)
      .orderBy(asc(departments.position)),
    db()
      .select({ id: users.id, name: users.name, role: users.role, department: users.department })
      .from(users)
      .where(and(isNull(users.disabledAt), inArray(users.role, ['builder', 'rep', 'admin'])))
      .orderBy(asc(users.role), asc(users.name))
      .limit(300),
    db().select({ fallbackId: shop.fallbackUserId }).from(shop),
    listStuck(),
  ]);
  return { topics: list, departments: places, staff, fallbackId: row?.fallbackId ?? null, stuck };
}

export type TopicSetUp = Awaited<ReturnType<typeof findTopicSetUp>>;

/** Open questions that nobody can answer: the build's number and the topic, never what was asked. */
function listStuck() {
  return db()
    .select({
      id: questions.id,
      orderNumber: builds.orderNumber,
      topic: topics.name,
      askedAt: questions.createdAt,
      dueAt: questions.dueAt,
    })
    .from(questions)
    .innerJoin(builds, eq(builds.id, questions.buildId))
    .innerJoin(topics, eq(topics.id, questions.topicId))
    .where(and(isNull(questions.penHolderId), eq(questions.state, 'waiting')))
    .orderBy(asc(questions.createdAt))
    .limit(100);
}

/** `answers` is a department's key, `rep`, or `reps_only` for what no builder reads. */
async function whoAnswers(tx: Tx, answers: string) {
  if (answers === 'rep' || answers === 'reps_only')
    return { answeredBy: 'rep', department: null, repsOnly: answers === 'reps_only' } as const;
  const [known] = await tx.select({ key: departments.key }).from(departments).where(eq(departments.key, answers));
  if (!known) throw new BadInput({ answers: 'Choose who answers from the list.' });
  return { answeredBy: 'department', department: known.key, repsOnly: false } as const;
}

/**
 * Keeps a topic, new or changed, and routes what waits on nobody again. Questions that somebody holds stay with them,
 * unless the topic became a matter for the reps only.
 * @throws OutOfReach for anybody but an admin, and for an unknown topic; BadInput
 */
export function saveTopic(
  viewer: Viewer,
  { topicId, name, answers, dueHours }: TopicForm,
  nowMs: number,
): Promise<void> {
  return write(async (tx) => {
    await requireCan(viewer, 'shop.set_up');
    const row = { name, dueHours, ...(await whoAnswers(tx, answers)) };
    if (topicId === '') return addTopic(tx, row);
    const [changed] = await tx.update(topics).set(row).where(eq(topics.id, topicId)).returning({ id: topics.id });
    if (!changed) throw new OutOfReach();
    await routeOpenOf(tx, topicId, nowMs);
  });
}

async function addTopic(tx: Tx, row: Omit<typeof topics.$inferInsert, 'id' | 'position'>): Promise<void> {
  const [{ n, last } = { n: 0, last: 0 }] = await tx.select({ n: count(), last: max(topics.position) }).from(topics);
  if (n >= MOST_TOPICS) throw new BadInput({ name: `There are ${MOST_TOPICS} topics already. Change one of them.` });
  await tx.insert(topics).values({ ...row, id: newId(), position: (last ?? 0) + 1 });
}

async function routeOpenOf(tx: Tx, topicId: string, nowMs: number): Promise<void> {
  const open = await tx
    .selectDistinct({ buildId: questions.buildId })
    .from(questions)
    .where(and(eq(questions.topicId, topicId), ne(questions.state, 'closed')))
    .orderBy(desc(questions.buildId));
  for (const { buildId } of open) await routeAgain(tx, { buildId }, nowMs);
}

async function requireStaff(tx: Tx, userId: string, field: string): Promise<void> {
  const [person] = await tx
    .select({ id: users.id })
    .from(users)
    .where(and(eq(users.id, userId), isNull(users.disabledAt), inArray(users.role, ['builder', 'rep', 'admin'])));
  if (!person) throw new BadInput({ [field]: 'Choose somebody at the shop from the list.' });
}

/** Names a department's lead, or nobody (''). @throws OutOfReach for anybody but an admin; BadInput */
export function saveLead(viewer: Viewer, departmentKey: string, leadId: string): Promise<void> {
  return write(async (tx) => {
    await requireCan(viewer, 'shop.set_up');
    if (leadId !== '') await requireStaff(tx, leadId, 'leadId');
    const [changed] = await tx
      .update(departments)
      .set({ leadId: leadId || null })
      .where(eq(departments.key, departmentKey))
      .returning({ key: departments.key });
    if (!changed) throw new OutOfReach();
  });
}

/** Names who answers what nobody else can, or nobody (''). @throws OutOfReach for anybody but an admin; BadInput */
export function saveFallback(viewer: Viewer, userId: string): Promise<void> {
  return write(async (tx) => {
    await requireCan(viewer, 'shop.set_up');
    if (userId !== '') await requireStaff(tx, userId, 'userId');
    await tx.update(shop).set({ fallbackUserId: userId || null });
  });
}
