import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { db } from '@/db/client';
import { postEntry } from '@/db/queries/entries';
import { outbox } from '@/db/schema';
import { writeDueDigests } from '@/lib/jobs/digests';
import { sendDueMail } from '@/lib/jobs/outbox';
import { noteOfText } from '@/lib/mail/reply-note';

/** A process of its own for `digest-kill`. It waits for a word before it opens the database: one process owns that. */

const builder = { id: 'builder', role: 'builder', name: 'Wren', department: 'neck', timeZone: 'UTC' } as const;
const PAGES_A_TURN = 2;

/** A new page on some builds, each with a mark of its own; their readers want mail at once. */
async function post(builds: number, nowMs: number): Promise<void> {
  for (let page = 0; page < PAGES_A_TURN; page++) {
    const build = Math.floor(Math.random() * builds);
    const note = noteOfText(`mark-${randomUUID()}`);
    if (!note.ok) throw new Error(note.message);
    const where = { orderNumber: `Q-${10_000 + build}`, stageId: `stage-build-${build}`, startStage: false } as const;
    const entry = { ...where, idempotencyKey: randomUUID(), audience: 'buyer', note } as const;
    await postEntry(builder, { ...entry, photos: [], readings: [], proves: [] }, nowMs);
  }
}

type Word = { offsetMs: number; builds: number; work: 'once' | 'forever' | 'until done' };

async function runOnce(owner: string, { offsetMs, builds }: Word): Promise<void> {
  const now = () => Date.now() + offsetMs;
  await post(builds, now());
  await writeDueDigests(owner, now);
  await sendDueMail(owner, now);
}

async function runForever(owner: string, word: Word): Promise<never> {
  for (;;) await runOnce(owner, word);
}

/** Moves its clock on to whatever waits next, until nothing does. */
async function finish(owner: string, { offsetMs }: Word): Promise<void> {
  let aheadMs = offsetMs;
  const now = () => Date.now() + aheadMs;
  for (;;) {
    await writeDueDigests(owner, now);
    await sendDueMail(owner, now);
    const waiting = await db().select({ at: outbox.nextAttemptAt }).from(outbox).where(eq(outbox.state, 'waiting'));
    const sending = await db().select({ at: outbox.leaseEndsAt }).from(outbox).where(eq(outbox.state, 'sending'));
    const next = [...waiting, ...sending].map(({ at }) => at ?? 0);
    if (next.length === 0) return;
    aheadMs += Math.max(1000, Math.min(...next) - now() + 1000);
  }
}

process.on('message', async (word: Word) => {
  process.send?.('begun');
  const owner = randomUUID();
  if (word.work === 'forever') return runForever(owner, word);
  const start = performance.now();
  await (word.work === 'once' ? runOnce(owner, word) : finish(owner, word));
  process.send?.({ tookMs: performance.now() - start });
});
process.send?.('ready');
