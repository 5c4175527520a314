import { index, integer, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { createdAt, id, instant } from './columns';
import { users } from './users';

/**
 * One asked-for sign-in. `user_id` is null when the address is unknown: the row is written all the same, so that both
 * cases cost the same. A claimed link has passed the browser or code check and waits for the adapter to consume it.
 */
export const signInLinks = sqliteTable(
  'sign_in_links',
  {
    id: id(),
    userId: text('user_id').references(() => users.id, { onDelete: 'cascade' }),
    tokenHash: text('token_hash').notNull(),
    codeHash: text('code_hash').notNull(),
    browserHash: text('browser_hash').notNull(),
    codeTries: integer('code_tries').notNull().default(0),
    expiresAt: instant('expires_at').notNull(),
    claimedAt: instant('claimed_at'),
    createdAt: createdAt(),
  },
  (t) => [
    uniqueIndex('sign_in_links_token_unique').on(t.tokenHash),
    index('sign_in_links_user').on(t.userId),
    index('sign_in_links_browser').on(t.browserHash),
    index('sign_in_links_expiry').on(t.expiresAt),
  ],
);
