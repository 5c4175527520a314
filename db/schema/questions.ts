import { sql } from 'drizzle-orm';
import { check, index, integer, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { createdAt, id, instant } from './columns';
import { builds } from './builds';
import { entries } from './entries';
import { departments } from './shop';
import { users } from './users';

/** What a question may be about, and who answers: a department's builder, or the rep. */
export const topics = sqliteTable(
  'topics',
  {
    id: text('id').primaryKey(),
    name: text('name').notNull(),
    position: integer('position').notNull(),
    answeredBy: text('answered_by', { enum: ['department', 'rep'] }).notNull(),
    department: text('department').references(() => departments.key),
    /** Money and artist matters are never shown to a builder. */
    repsOnly: integer('reps_only', { mode: 'boolean' }).notNull().default(false),
  },
  (t) => [
    check('topics_answered_by_known', sql`${t.answeredBy} in ('department', 'rep')`),
    check('topics_reps_only_has_no_department', sql`not (${t.repsOnly} and ${t.answeredBy} = 'department')`),
  ],
);

export const questions = sqliteTable(
  'questions',
  {
    id: id(),
    buildId: text('build_id')
      .notNull()
      .references(() => builds.id, { onDelete: 'cascade' }),
    entryId: text('entry_id').references(() => entries.id, { onDelete: 'set null' }),
    topicId: text('topic_id')
      .notNull()
      .references(() => topics.id),
    askedById: text('asked_by_id')
      .notNull()
      .references(() => users.id),
    subject: text('subject').notNull(),
    /** Who must answer now; null when nobody on the build can. */
    penHolderId: text('pen_holder_id').references(() => users.id),
    state: text('state', { enum: ['waiting', 'answered'] }).notNull(),
    idempotencyKey: text('idempotency_key').notNull(),
    lastLetterAt: instant('last_letter_at').notNull(),
    createdAt: createdAt(),
  },
  (t) => [
    index('questions_build').on(t.buildId, t.lastLetterAt),
    index('questions_pen').on(t.penHolderId, t.state, t.lastLetterAt),
    index('questions_state').on(t.state, t.lastLetterAt),
    uniqueIndex('questions_idempotency_unique').on(t.askedById, t.idempotencyKey),
    check('questions_state_known', sql`${t.state} in ('waiting', 'answered')`),
  ],
);

export const letters = sqliteTable(
  'letters',
  {
    id: id(),
    questionId: text('question_id')
      .notNull()
      .references(() => questions.id, { onDelete: 'cascade' }),
    authorId: text('author_id')
      .notNull()
      .references(() => users.id),
    side: text('side', { enum: ['client', 'shop'] }).notNull(),
    body: text('body').notNull(),
    bodyText: text('body_text').notNull(),
    idempotencyKey: text('idempotency_key').notNull(),
    writtenAt: instant('written_at').notNull(),
  },
  (t) => [
    index('letters_question').on(t.questionId, t.writtenAt),
    uniqueIndex('letters_idempotency_unique').on(t.authorId, t.idempotencyKey),
    check('letters_side_known', sql`${t.side} in ('client', 'shop')`),
  ],
);
