import { sql } from 'drizzle-orm';
import { check, index, integer, primaryKey, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { createdAt, id, instant } from './columns';
import { builds, buildStages } from './builds';
import { users } from './users';

/** One dated post in a build's diary. */
export const entries = sqliteTable(
  'entries',
  {
    id: id(),
    buildId: text('build_id')
      .notNull()
      .references(() => builds.id, { onDelete: 'cascade' }),
    stageId: text('stage_id')
      .notNull()
      .references(() => buildStages.id),
    authorId: text('author_id')
      .notNull()
      .references(() => users.id),
    /** Canonical rich-text document as JSON. */
    body: text('body').notNull(),
    bodyText: text('body_text').notNull(),
    audience: text('audience', { enum: ['buyer', 'shop'] }).notNull(),
    state: text('state', { enum: ['held', 'published', 'withdrawn'] }).notNull(),
    /** The date in the margin: when it was posted, or released if it was held. */
    datedAt: instant('dated_at').notNull(),
    revision: integer('revision').notNull().default(1),
    editedAt: instant('edited_at'),
    idempotencyKey: text('idempotency_key').notNull(),
    createdAt: createdAt(),
  },
  (t) => [
    index('entries_diary').on(t.buildId, t.datedAt, t.id),
    uniqueIndex('entries_idempotency_unique').on(t.authorId, t.idempotencyKey),
    check('entries_audience_known', sql`${t.audience} in ('buyer', 'shop')`),
    check('entries_state_known', sql`${t.state} in ('held', 'published', 'withdrawn')`),
  ],
);

/** When a reader last opened a diary, and the visit before that, so that "new" outlives a reload. */
export const diaryVisits = sqliteTable(
  'diary_visits',
  {
    buildId: text('build_id')
      .notNull()
      .references(() => builds.id, { onDelete: 'cascade' }),
    userId: text('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    visitedAt: instant('visited_at').notNull(),
    visitBeforeAt: instant('visit_before_at'),
  },
  (t) => [primaryKey({ columns: [t.buildId, t.userId] })],
);

/** What the buyer may be told, in the order it happened; digests read from here. Written with the change itself. */
export const diaryEvents = sqliteTable(
  'diary_events',
  {
    seq: integer('seq').primaryKey({ autoIncrement: true }),
    buildId: text('build_id')
      .notNull()
      .references(() => builds.id, { onDelete: 'cascade' }),
    entryId: text('entry_id')
      .notNull()
      .references(() => entries.id, { onDelete: 'cascade' }),
    at: instant('at').notNull(),
  },
  (t) => [index('diary_events_build').on(t.buildId, t.seq)],
);
