import { eq } from 'drizzle-orm';
import { database, db, write } from '@/db/client';
import { seedDemoWorld } from '@/db/demo/seed';
import { builds, buildStages, entries, outbox, sessions, users } from '@/db/schema';
import { hashToken } from '@/lib/auth/secrets';
import { plainNote } from '@/lib/rich-text/plain-text';
import { hostileNotes } from '../support/hostile-notes';
import { HOSTILE_ORDER, tokenFor } from './tokens';

/** The demo world, and for each of its people a session whose cookie the tests can name. */
await seedDemoWorld(Date.now(), () => undefined);
const people = await db().select({ id: users.id, email: users.email }).from(users);
const nowMs = Date.now();
const endsAt = nowMs + 3_600_000 * 6;
await write(async (tx) => {
  for (const { id, email } of people) {
    const row = { userId: id, tokenHash: hashToken(tokenFor(email)), lastSeenAt: nowMs, idleEndsAt: endsAt, endsAt };
    await tx.insert(sessions).values(row);
  }
  const [somebody] = people;
  if (!somebody) throw new Error('the demo world is empty');
  const mail = {
    kind: 'invitation',
    userId: somebody.id,
    about: {},
    dedupeKey: 'given-up',
    nextAttemptAt: nowMs,
  } as const;
  await tx.insert(outbox).values({ ...mail, state: 'failed', lastProblem: 'given up: the address was refused' });
  await tx.insert(outbox).values({ ...mail, dedupeKey: `${mail.dedupeKey}/dropped`, state: 'dropped' });
  // One whose time is over: its cookie must open nothing.
  const over = { lastSeenAt: nowMs - 9e8, idleEndsAt: nowMs - 1000, endsAt: nowMs - 1000 };
  await tx.insert(sessions).values({ userId: somebody.id, tokenHash: hashToken(tokenFor('ended')), ...over });
});
await enterHostileNotes();
database().close();

/** Straight into the rows, as if the check at the door had let them through. */
async function enterHostileNotes() {
  const [build] = await db().select({ id: builds.id }).from(builds).where(eq(builds.orderNumber, HOSTILE_ORDER));
  const [stage] = await db()
    .select({ id: buildStages.id })
    .from(buildStages)
    .where(eq(buildStages.buildId, build?.id ?? ''));
  const [author] = people;
  if (!build || !stage || !author) throw new Error(`the demo world has no ${HOSTILE_ORDER}`);
  const harmless = (text: string) => JSON.stringify(plainNote(text));
  const bodies = [
    harmless('A harmless page before all of them.'),
    ...hostileNotes.filter(({ json }) => json.length < 300_000).map(({ json }) => json),
    harmless('A harmless page after all of them.'),
  ];
  const shared = {
    buildId: build.id,
    stageId: stage.id,
    authorId: author.id,
    audience: 'buyer',
    state: 'published',
  } as const;
  await write(async (tx) => {
    for (const [index, body] of bodies.entries()) {
      await tx
        .insert(entries)
        .values({ ...shared, body, bodyText: '', datedAt: nowMs + index, idempotencyKey: `hostile-${index}` });
    }
  });
}
