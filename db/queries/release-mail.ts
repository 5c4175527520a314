import { staffOn } from './answerers';
import { queueMail } from './outbox';
import type { Tx } from '../client';

type HeldEntry = { id: string; buildId: string; revision: number };

/** Tells the reps on a build that an entry waits for their release; once for each version of it. */
export async function askForRelease(tx: Tx, { id, buildId, revision }: HeldEntry, nowMs: number): Promise<void> {
  const staff = await staffOn(tx, buildId, nowMs);
  for (const { id: userId } of staff.filter(({ role }) => role === 'rep')) {
    const mail = { kind: 'held_entry' as const, userId, about: { entryIds: [id] } };
    await queueMail(tx, { ...mail, dedupeKey: `held_entry/${id}/${revision}/${userId}` }, nowMs);
  }
}
