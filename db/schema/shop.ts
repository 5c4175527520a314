import { sql } from 'drizzle-orm';
import { check, integer, sqliteTable, text } from 'drizzle-orm/sqlite-core';

/** The one row that says whose shop this is. */
export const shop = sqliteTable(
  'shop',
  {
    id: integer('id').primaryKey(),
    name: text('name').notNull(),
    timeZone: text('time_zone').notNull(),
  },
  (t) => [check('shop_single', sql`${t.id} = 1`)],
);

export const departments = sqliteTable('departments', {
  key: text('key').primaryKey(),
  name: text('name').notNull(),
  position: integer('position').notNull(),
});
