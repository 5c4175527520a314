import { integer, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';

/**
 * What the full-text index `search_index` numbers its rows by: triggers keep both in step with entries and letters. A
 * number of its own, because the row numbers of those tables may change when the file is compacted. The index knows each
 * row's words and, as one word in `place`, its build: whoever reaches few builds looks among their rows only.
 */
export const searchRows = sqliteTable(
  'search_rows',
  {
    seq: integer('seq').primaryKey(),
    kind: text('kind', { enum: ['entry', 'letter'] }).notNull(),
    /** The entry's or letter's id. */
    subjectId: text('subject_id').notNull(),
    /** Whose build it is, so that what is out of reach is left aside before it is read. */
    buildId: text('build_id').notNull().default(''),
  },
  (t) => [uniqueIndex('search_rows_subject_unique').on(t.subjectId)],
);
