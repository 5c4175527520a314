import { eq } from 'drizzle-orm';
import { buyerQuestions, marginWords, shopPhrases } from './notes';
import type { EnteredBuild } from './enter-build';
import type { Cast } from './people';
import { demoTopics } from './shop-floor';
import { DAY_MS } from './timeline';
import type { Tx } from '../client';
import { staffOn } from '../queries/answerers';
import { unscopedCalendar } from '../queries/calendar';
import {
  departments,
  letters,
  marginNotes,
  penPasses,
  questionReads,
  questions,
  savedPhrases,
  topics,
} from '../schema';
import { newId } from '../schema/columns';
import { answerDueAt } from '@/lib/questions/answer-due';
import { routeQuestion, type Candidate } from '@/lib/questions/route-question';
import { plainNote } from '@/lib/rich-text/plain-text';

const HOUR_MS = 3_600_000;

type Asked = (typeof buyerQuestions)[number];
type Topic = (typeof demoTopics)[number];
type Step = { index: number; build: EnteredBuild; asked: Asked; topic: Topic; holder: Candidate; askedAt: number };

/** Puts a question from every second owner on the floor: answered, due, late, closed, with what the shop notes beside them. */
export async function enterQuestions(tx: Tx, onFloor: EnteredBuild[], cast: Cast, nowMs: number): Promise<void> {
  await enterSetUp(tx, cast);
  // The shop's own row comes last, and with it its zone.
  const calendar = { ...(await unscopedCalendar(tx)), zone: cast.admin.timeZone };
  for (const [index, build] of onFloor.filter((_, place) => place % 2 === 0).entries()) {
    const asked = buyerQuestions[index % buyerQuestions.length];
    const topic = demoTopics.find(({ id }) => id === asked?.topic);
    const onBuild = await staffOn(tx, build.id, nowMs);
    const { holder } = routeQuestion({ topic: routing(topic), onBuild, lead: null, fallback: null });
    if (!asked || !topic || !holder) continue;
    const askedAt = nowMs - (asked.answer ? (index + 1) * 0.6 * DAY_MS : (index % 4) * 7 * HOUR_MS + HOUR_MS);
    const step = { index, build, asked, topic, holder, askedAt };
    await enterQuestion(tx, step, answerDueAt(calendar, askedAt, topic.dueHours), nowMs);
  }
}

function routing(topic: Topic | undefined) {
  const repsOnly = topic !== undefined && 'repsOnly' in topic;
  return { answeredBy: topic?.answeredBy ?? 'rep', department: topic?.department ?? null, repsOnly };
}

/** The first builder of each department leads it, and the shop's phrases are kept. */
async function enterSetUp(tx: Tx, cast: Cast): Promise<void> {
  for (const { id, department } of [...cast.builders].reverse())
    if (department) await tx.update(departments).set({ leadId: id }).where(eq(departments.key, department));
  for (const { id, dueHours } of demoTopics) await tx.update(topics).set({ dueHours }).where(eq(topics.id, id));
  await tx.insert(savedPhrases).values(shopPhrases.map((phrase) => ({ ...phrase, ownerId: null })));
}

async function enterQuestion(tx: Tx, step: Step, dueAt: number, nowMs: number): Promise<void> {
  const { index, build, asked, topic, holder, askedAt } = step;
  const answeredAt = Math.min(askedAt + 3 * HOUR_MS, nowMs - 60_000);
  const isClosed = asked.answer !== null && index % 5 === 4;
  const id = newId();
  await tx.insert(questions).values({
    id,
    buildId: build.id,
    entryId: asked.topic === 'finish' ? (build.entryIds.at(-1) ?? null) : null,
    topicId: topic.id,
    askedById: build.owner.id,
    subject: asked.subject,
    penHolderId: holder.id,
    state: isClosed ? 'closed' : asked.answer ? 'answered' : 'waiting',
    dueAt: asked.answer ? null : dueAt,
    // What is late in the demo was said when it was: nobody is mailed as the demo starts.
    remindedBeforeAt: dueAt < nowMs ? dueAt : null,
    remindedDueAt: dueAt < nowMs ? dueAt : null,
    overdueToldAt: dueAt < nowMs && !asked.answer ? dueAt : null,
    firstAnsweredAt: asked.answer ? answeredAt : null,
    ...(isClosed ? { closedAt: answeredAt + HOUR_MS, closedById: build.owner.id, closedHow: 'closed' as const } : {}),
    lastLetterAt: asked.answer ? answeredAt : askedAt,
    createdAt: askedAt,
    idempotencyKey: `demo-${id}`,
  });
  await enterLetter(tx, id, build.owner.id, 'client', asked.text, askedAt);
  if (asked.answer) await enterLetter(tx, id, holder.id, 'shop', asked.answer, answeredAt);
  await enterReads(tx, id, step, asked.answer ? answeredAt : askedAt, nowMs);
  await enterShopSide(tx, id, step, nowMs);
}

async function enterLetter(
  tx: Tx,
  questionId: string,
  authorId: string,
  side: 'client' | 'shop',
  text: string,
  writtenAt: number,
) {
  const id = newId();
  const body = JSON.stringify(plainNote(text));
  await tx
    .insert(letters)
    .values({ id, questionId, authorId, side, body, bodyText: text, writtenAt, idempotencyKey: `demo-${id}` });
}

/** Most have been opened within the hour. */
async function enterReads(tx: Tx, questionId: string, { index, build, holder }: Step, lastAt: number, nowMs: number) {
  if (index % 3 === 2) return;
  const readAt = Math.min(lastAt + (12 + index) * 60_000, nowMs - 30_000);
  for (const userId of new Set([build.owner.id, holder.id]))
    await tx.insert(questionReads).values({ questionId, userId, readAt });
}

/** On every third question the rep and its holder talk in the margin; on every fourth the pen has been passed. */
async function enterShopSide(tx: Tx, questionId: string, { index, build, holder, askedAt }: Step, nowMs: number) {
  const at = (minutes: number) => Math.min(askedAt + minutes * 60_000, nowMs - 30_000);
  const words = marginWords[index % marginWords.length];
  if (index % 3 === 0 && words) {
    await enterMargin(tx, questionId, build.rep.id, words.asks, at(40));
    if (holder.id !== build.rep.id) await enterMargin(tx, questionId, holder.id, words.answers, at(62));
  }
  if (index % 4 !== 1 || holder.id === build.rep.id) return;
  await tx.insert(penPasses).values({
    questionId,
    fromId: build.rep.id,
    toId: holder.id,
    byId: build.rep.id,
    reason: 'It is on your bench, you see it better than I do.',
    passedAt: at(20),
  });
}

async function enterMargin(tx: Tx, questionId: string, authorId: string, text: string, writtenAt: number) {
  const id = newId();
  const body = JSON.stringify(plainNote(text));
  await tx
    .insert(marginNotes)
    .values({ id, questionId, authorId, body, bodyText: text, writtenAt, idempotencyKey: `demo-${id}` });
}
