import { real, sqliteTable, text } from 'drizzle-orm/sqlite-core';
import { instant } from './columns';

/** Leaky buckets: `level` drains with time and each use adds one. The key never holds an address in clear. */
export const rateLimits = sqliteTable('rate_limits', {
  key: text('key').primaryKey(),
  level: real('level').notNull(),
  updatedAt: instant('updated_at').notNull(),
});
