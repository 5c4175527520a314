import { createHash, createHmac, randomBytes, randomInt } from 'node:crypto';
import { env } from '@/lib/env';

/** 256 random bits, URL-safe. */
export const newToken = () => randomBytes(32).toString('base64url');

/** Six digits; safe only together with the cookie of the browser that asked and a count of tries. */
export const newCode = () => randomInt(0, 1_000_000).toString().padStart(6, '0');

export const hashToken = (token: string) => createHash('sha256').update(token).digest('hex');

/** As next-auth hashes a mailed token before it asks the adapter for it. */
export const hashMailedToken = (token: string) =>
  createHash('sha256').update(`${token}${env().AUTH_SECRET}`).digest('hex');

/** A keyed hash for what is short or guessable by itself: codes, addresses, the token that only unsubscribes. */
export const keyedHash = (purpose: string, value: string) =>
  createHmac('sha256', env().AUTH_SECRET).update(`${purpose}\n${value}`).digest('base64url');
