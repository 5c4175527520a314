import { database, db, write } from '@/db/client';
import { seedDemoWorld } from '@/db/demo/seed';
import { outbox, sessions, users } from '@/db/schema';
import { hashToken } from '@/lib/auth/secrets';
import { tokenFor } from './tokens';

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
  // One whose time is over: its cookie must open nothing.
  const over = { lastSeenAt: nowMs - 9e8, idleEndsAt: nowMs - 1000, endsAt: nowMs - 1000 };
  await tx.insert(sessions).values({ userId: somebody.id, tokenHash: hashToken(tokenFor('ended')), ...over });
});
database().close();
