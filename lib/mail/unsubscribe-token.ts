import { timingSafeEqual } from 'node:crypto';
import { keyedHash } from '@/lib/auth/secrets';

/** Opens nothing but the end of one person's diary mails. */
export const unsubscribeToken = (userId: string) => `${userId}.${keyedHash('unsubscribe', userId)}`;

/** Whose token this is, or null. */
export function readUnsubscribeToken(token: string): string | null {
  const userId = token.slice(0, token.indexOf('.'));
  const expected = Buffer.from(unsubscribeToken(userId));
  const given = Buffer.from(token);
  return given.length === expected.length && timingSafeEqual(given, expected) ? userId : null;
}
