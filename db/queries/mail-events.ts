import { and, eq, sql } from 'drizzle-orm';
import { alias } from 'drizzle-orm/sqlite-core';
import { db } from '../client';
import { buildIsVisible, entryIsVisible, isOpen, questionIsVisible, signOffIsVisible } from '../scope';
import {
  builds,
  buildStages,
  changeRequests,
  entries,
  questions,
  readyWindows,
  signOffs,
  specVersions,
  topics,
  users,
} from '../schema';
import { isStaffRole } from '@/lib/access';
import type { Viewer } from '@/lib/viewer';

/** What a mail about one thing tells, as far as its reader may still read it; null when they no longer may. */

const ofBuild = {
  orderNumber: builds.orderNumber,
  instrument: builds.instrument,
  held: sql<number>`not ${isOpen}`,
};

export async function findMailedBuild(reader: Viewer, buildId: string) {
  const [build] = await db()
    .select({ ...ofBuild, readyAt: builds.readyAt, shippedAt: builds.shippedAt, shippedBy: builds.shippedBy })
    .from(builds)
    .where(and(eq(builds.id, buildId), buildIsVisible(reader)));
  return build ?? null;
}

/** A question that still waits for its answer. */
export async function findMailedQuestion(reader: Viewer, questionId: string) {
  const holder = alias(users, 'holder');
  const [question] = await db()
    .select({
      ...ofBuild,
      subject: questions.subject,
      topic: topics.name,
      dueAt: questions.dueAt,
      penHolderId: questions.penHolderId,
      holderName: holder.name,
    })
    .from(questions)
    .innerJoin(builds, eq(builds.id, questions.buildId))
    .innerJoin(topics, eq(topics.id, questions.topicId))
    .leftJoin(holder, eq(holder.id, questions.penHolderId))
    .where(
      and(
        eq(questions.id, questionId),
        eq(questions.state, 'waiting'),
        buildIsVisible(reader),
        questionIsVisible(reader),
      ),
    );
  return question ?? null;
}

/** An entry that still waits for its release. */
export async function findMailedHeldEntry(reader: Viewer, entryId: string) {
  const [entry] = await db()
    .select({ ...ofBuild, author: users.name, stage: buildStages.name, text: entries.bodyText })
    .from(entries)
    .innerJoin(builds, eq(builds.id, entries.buildId))
    .innerJoin(buildStages, eq(buildStages.id, entries.stageId))
    .innerJoin(users, eq(users.id, entries.authorId))
    .where(and(eq(entries.id, entryId), eq(entries.state, 'held'), buildIsVisible(reader), entryIsVisible(reader)));
  return entry ?? null;
}

export async function findMailedSignOff(reader: Viewer, signOffId: string) {
  const asker = alias(users, 'asker');
  const answerer = alias(users, 'answerer');
  const [signOff] = await db()
    .select({
      ...ofBuild,
      title: signOffs.title,
      message: signOffs.message,
      dueOn: signOffs.dueOn,
      state: signOffs.state,
      answer: signOffs.answer,
      askerName: asker.name,
      answererName: answerer.name,
    })
    .from(signOffs)
    .innerJoin(builds, eq(builds.id, signOffs.buildId))
    .innerJoin(asker, eq(asker.id, signOffs.askedById))
    .leftJoin(answerer, eq(answerer.id, signOffs.answeredById))
    .where(and(eq(signOffs.id, signOffId), buildIsVisible(reader), signOffIsVisible(reader)));
  return signOff ?? null;
}

/** What the last version that knows the item of a change request calls it. */
const changedItem = sql<
  string | null
>`(select json_extract(item.value, '$.label') from ${specVersions}, json_each(${specVersions.document}, '$.items') item where ${specVersions.buildId} = ${changeRequests.buildId} and json_extract(item.value, '$.key') = ${changeRequests.itemKey} order by ${specVersions.number} desc limit 1)`;

/** A change request, to the staff on its build and to the owner who asked. */
export async function findMailedChange(reader: Viewer, changeId: string) {
  const [change] = await db()
    .select({
      ...ofBuild,
      label: sql<string>`coalesce(${changedItem}, ${changeRequests.itemKey})`,
      wish: changeRequests.wish,
      state: changeRequests.state,
      answer: changeRequests.answer,
      askerName: users.name,
    })
    .from(changeRequests)
    .innerJoin(builds, eq(builds.id, changeRequests.buildId))
    .innerJoin(users, eq(users.id, changeRequests.askedById))
    .where(
      and(
        eq(changeRequests.id, changeId),
        buildIsVisible(reader),
        isStaffRole(reader.role) ? undefined : eq(changeRequests.askedById, reader.id),
      ),
    );
  return change ?? null;
}

/** The ready window as it was given on that day of the shop. */
export async function findMailedWindow(reader: Viewer, buildId: string, givenOn: string) {
  const [window] = await db()
    .select({
      ...ofBuild,
      kind: readyWindows.kind,
      earliestOn: readyWindows.earliestOn,
      latestOn: readyWindows.latestOn,
      movedWhy: readyWindows.movedWhy,
    })
    .from(readyWindows)
    .innerJoin(builds, eq(builds.id, readyWindows.buildId))
    .where(and(eq(readyWindows.buildId, buildId), eq(readyWindows.givenOn, givenOn), buildIsVisible(reader)));
  return window ?? null;
}
