import { and, desc, eq, gt, isNull, sql, type SQLWrapper } from 'drizzle-orm';
import { alias } from 'drizzle-orm/sqlite-core';
import { db } from '../client';
import { preparedByRole } from '../prepared';
import { buildIsVisible, entryIsVisible, isOpen, photoIsVisible, questionIsVisible } from '../scope';
import {
  builds,
  buildStages,
  entries,
  letters,
  mailSettings,
  photos,
  questions,
  readings,
  signInLinks,
  topics,
  users,
} from '../schema';
import { MAX_ENTRIES_TOLD } from './digests';
import type { Viewer } from '@/lib/viewer';

/** The reader of a mail with what sending needs; null when the account is closed. */
export async function findMailReader(userId: string) {
  const [reader] = await db()
    .select({
      id: users.id,
      email: users.email,
      name: users.name,
      role: users.role,
      department: users.department,
      timeZone: users.timeZone,
      locale: users.locale,
      units: users.units,
      unreachableWhy: users.unreachableWhy,
      cadence: mailSettings.cadence,
      quietFromHour: mailSettings.quietFromHour,
      quietToHour: mailSettings.quietToHour,
    })
    .from(users)
    .leftJoin(mailSettings, eq(mailSettings.userId, users.id))
    .where(and(eq(users.id, userId), isNull(users.disabledAt)));
  return reader ?? null;
}

export type MailReader = NonNullable<Awaited<ReturnType<typeof findMailReader>>>;

/** The readings of an entry of the outer query, as JSON; in the one statement, because a digest run asks for thousands. */
const readingsOfEntry = sql<string>`(select json_group_array(json_object('value', json(r.value), 'shown', json(r.shown))) filter (where json_valid(r.value) and json_valid(r.shown)) from (select ${readings.value}, ${readings.shown} from ${readings} where ${readings.entryId} = ${entries.id} order by ${readings.position}) r)`;

/** One of the given ids; a list as JSON, because the number of values is part of a prepared text. */
const isGiven = (id: SQLWrapper) => sql`${id} in (select value from json_each(${sql.placeholder('entryIds')}))`;

const entriesOf = preparedByRole((on, reader) =>
  on
    .select({
      id: entries.id,
      buildId: builds.id,
      orderNumber: builds.orderNumber,
      instrument: builds.instrument,
      held: sql<number>`not ${isOpen}`,
      stage: buildStages.name,
      author: users.name,
      text: entries.bodyText,
      datedAt: entries.datedAt,
      readings: readingsOfEntry,
    })
    .from(entries)
    .innerJoin(builds, eq(builds.id, entries.buildId))
    .innerJoin(buildStages, eq(buildStages.id, entries.stageId))
    .innerJoin(users, eq(users.id, entries.authorId))
    .where(and(isGiven(entries.id), buildIsVisible(reader), entryIsVisible(reader)))
    .orderBy(desc(entries.datedAt), desc(entries.id))
    .limit(MAX_ENTRIES_TOLD)
    .prepare(),
);

/** Those of these entries that the reader may still read, newest first; of a held build nothing but its number. */
export const listDigestEntries = ({ id, role }: Viewer, entryIds: string[]) =>
  entriesOf(role).all({ viewerId: id, entryIds: JSON.stringify(entryIds) });

const photosOf = preparedByRole((on, reader) =>
  on
    .select({ entryId: photos.entryId, outPrefix: photos.outPrefix, alt: photos.alt })
    .from(photos)
    .innerJoin(builds, eq(builds.id, photos.buildId))
    .where(and(isGiven(photos.entryId), eq(photos.position, 0), buildIsVisible(reader), photoIsVisible(reader)))
    .limit(60)
    .prepare(),
);

/** The first photo of each of these entries that the reader may see. */
export const listDigestPhotos = ({ id, role }: Viewer, entryIds: string[]) =>
  photosOf(role).all({ viewerId: id, entryIds: JSON.stringify(entryIds) });

const writer = alias(users, 'writer');

/** A letter as its mail tells of it, if the reader may still read the question. */
export async function findMailedLetter(reader: Viewer, letterId: string) {
  const [letter] = await db()
    .select({
      questionId: questions.id,
      orderNumber: builds.orderNumber,
      instrument: builds.instrument,
      held: sql<number>`not ${isOpen}`,
      topic: topics.name,
      subject: questions.subject,
      dueAt: questions.dueAt,
      side: letters.side,
      text: letters.bodyText,
      writerName: writer.name,
      writerDepartment: writer.department,
    })
    .from(letters)
    .innerJoin(questions, eq(questions.id, letters.questionId))
    .innerJoin(topics, eq(topics.id, questions.topicId))
    .innerJoin(builds, eq(builds.id, questions.buildId))
    .innerJoin(writer, eq(writer.id, letters.authorId))
    .where(and(eq(letters.id, letterId), buildIsVisible(reader), questionIsVisible(reader)));
  return letter ?? null;
}

/** Whether a sign-in link can still be used: a mail about a dead one is not sent. */
export async function isLinkLive(linkId: string, nowMs: number): Promise<boolean> {
  const [link] = await db()
    .select({ id: signInLinks.id })
    .from(signInLinks)
    .where(and(eq(signInLinks.id, linkId), gt(signInLinks.expiresAt, nowMs), isNull(signInLinks.claimedAt)));
  return link !== undefined;
}
