import { eq } from 'drizzle-orm';
import type { Tx } from '../client';
import { write } from '../client';
import { rateLimits } from '../schema';
import { limits, type LimitName } from '@/lib/rate-limits';

/**
 * Puts one drop into a leaky bucket, unless it is full. A refused try does not fill it further.
 * @returns 0 when allowed, else the seconds until there is room
 */
export async function takeFromLimit(tx: Tx, name: LimitName, who: string, nowMs: number): Promise<number> {
  const { capacity, perMs } = limits[name];
  const key = `${name}:${who}`;
  const [bucket] = await tx.select().from(rateLimits).where(eq(rateLimits.key, key));
  const drained = bucket ? Math.max(0, bucket.level - ((nowMs - bucket.updatedAt) / perMs) * capacity) : 0;
  if (drained + 1 > capacity) return Math.ceil(((drained + 1 - capacity) * perMs) / capacity / 1000);
  await tx
    .insert(rateLimits)
    .values({ key, level: drained + 1, updatedAt: nowMs })
    .onConflictDoUpdate({ target: rateLimits.key, set: { level: drained + 1, updatedAt: nowMs } });
  return 0;
}

export const takeOne = (name: LimitName, who: string, nowMs: number) =>
  write((tx) => takeFromLimit(tx, name, who, nowMs));
