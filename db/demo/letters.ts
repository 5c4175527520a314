import { buyerQuestions } from './notes';
import type { EnteredBuild } from './enter-build';
import type { Cast } from './people';
import { demoTopics } from './shop-floor';
import { DAY_MS } from './timeline';
import type { Tx } from '../client';
import { letters, questions } from '../schema';
import { newId } from '../schema/columns';
import { plainNote } from '@/lib/rich-text/plain-text';
import { penHolder } from '@/lib/questions/pen-holder';

/** Puts a question from every second owner on the floor, most of them answered. */
export async function enterQuestions(tx: Tx, onFloor: EnteredBuild[], cast: Cast, nowMs: number): Promise<void> {
  for (const [index, build] of onFloor.filter((_, place) => place % 2 === 0).entries()) {
    const asked = buyerQuestions[index % buyerQuestions.length];
    const topic = demoTopics.find(({ id }) => id === asked?.topic);
    if (!asked || !topic) continue;
    const holderId = penHolder(topic, [build.rep, ...cast.builders]);
    const answerer = [build.rep, ...cast.builders].find(({ id }) => id === holderId) ?? build.rep;
    const askedAt = nowMs - (index + 1) * 0.6 * DAY_MS;
    const answeredAt = askedAt + 3 * 3_600_000;
    const question = {
      id: newId(),
      buildId: build.id,
      entryId: asked.topic === 'finish' ? (build.entryIds.at(-1) ?? null) : null,
      topicId: topic.id,
      askedById: build.owner.id,
      subject: asked.subject,
      penHolderId: answerer.id,
      state: asked.answer ? ('answered' as const) : ('waiting' as const),
      lastLetterAt: asked.answer ? answeredAt : askedAt,
      createdAt: askedAt,
    };
    await tx.insert(questions).values({ ...question, idempotencyKey: `demo-${question.id}` });
    await enterLetter(tx, question.id, build.owner.id, 'client', asked.text, askedAt);
    if (asked.answer) await enterLetter(tx, question.id, answerer.id, 'shop', asked.answer, answeredAt);
  }
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
