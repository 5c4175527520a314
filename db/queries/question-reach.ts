import { and, eq } from 'drizzle-orm';
import type { Db, Tx } from '../client';
import { db } from '../client';
import { buildIsVisible, questionIsVisible } from '../scope';
import { builds, questions, topics } from '../schema';
import { OutOfReach } from '@/lib/errors';
import type { Viewer } from '@/lib/viewer';

/** The question, with what its rules rest on, if the viewer reads it. @throws OutOfReach */
export async function requireReachable(viewer: Viewer, questionId: string, reader: Db | Tx = db()) {
  const [question] = await reader
    .select({
      id: questions.id,
      buildId: questions.buildId,
      orderNumber: builds.orderNumber,
      askedById: questions.askedById,
      penHolderId: questions.penHolderId,
      state: questions.state,
      dueAt: questions.dueAt,
      firstAnsweredAt: questions.firstAnsweredAt,
      lastLetterAt: questions.lastLetterAt,
      closedAt: questions.closedAt,
      topic: {
        answeredBy: topics.answeredBy,
        department: topics.department,
        repsOnly: topics.repsOnly,
        dueHours: topics.dueHours,
      },
    })
    .from(questions)
    .innerJoin(builds, eq(builds.id, questions.buildId))
    .innerJoin(topics, eq(topics.id, questions.topicId))
    .where(and(eq(questions.id, questionId), buildIsVisible(viewer), questionIsVisible(viewer)));
  if (!question) throw new OutOfReach();
  return question;
}

export type ReachedQuestion = Awaited<ReturnType<typeof requireReachable>>;
