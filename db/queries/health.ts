import { eq } from 'drizzle-orm';
import { db, write } from '../client';
import { rateLimits } from '../schema';

const key = 'health';

/** Writes one row and reads it back; false when either fails. */
export async function checkHealth(nowMs: number): Promise<boolean> {
  try {
    const row = { level: 0, updatedAt: nowMs };
    await write((tx) =>
      tx
        .insert(rateLimits)
        .values({ key, ...row })
        .onConflictDoUpdate({ target: rateLimits.key, set: row }),
    );
    const [found] = await db().select({ at: rateLimits.updatedAt }).from(rateLimits).where(eq(rateLimits.key, key));
    return found !== undefined && found.at >= nowMs;
  } catch {
    return false;
  }
}
