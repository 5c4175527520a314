import { index, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { createdAt, id, instant } from './columns';
import { users } from './users';

/** A signed-in browser. Only the SHA-256 of its cookie is kept. */
export const sessions = sqliteTable(
  'sessions',
  {
    id: id(),
    tokenHash: text('token_hash').notNull(),
    userId: text('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    device: text('device').notNull().default('a browser'),
    lastSeenAt: instant('last_seen_at').notNull(),
    idleEndsAt: instant('idle_ends_at').notNull(),
    endsAt: instant('ends_at').notNull(),
    createdAt: createdAt(),
  },
  (t) => [uniqueIndex('sessions_token_unique').on(t.tokenHash), index('sessions_user').on(t.userId)],
);
