import { randomBytes } from 'node:crypto';
import { integer, text } from 'drizzle-orm/sqlite-core';

/** 128 random bits, URL-safe. Unguessable, but no right ever rests on that. */
export const newId = () => randomBytes(16).toString('base64url');

export const id = () => text('id').primaryKey().$defaultFn(newId);

/** An instant: whole milliseconds since 1970 in UTC; its column is named `*_at`. */
export const instant = (name: string) => integer(name);

export const createdAt = () =>
  integer('created_at')
    .notNull()
    .$defaultFn(() => Date.now());
