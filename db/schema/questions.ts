import { sql } from 'drizzle-orm';
import { check, index, integer, primaryKey, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
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
    /** Working hours within which the first answer is due. */
    dueHours: integer('due_hours').notNull().default(8),
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
    /** waiting: on the shop, the clock runs; answered: on the client, it stands. */
    state: text('state', { enum: ['waiting', 'answered', 'closed'] }).notNull(),
    /** When the answer is due; null while the clock stands. */
    dueAt: instant('due_at'),
    firstAnsweredAt: instant('first_answered_at'),
    remindedBeforeAt: instant('reminded_before_at'),
    remindedDueAt: instant('reminded_due_at'),
    overdueToldAt: instant('overdue_told_at'),
    closedAt: instant('closed_at'),
    closedById: text('closed_by_id').references(() => users.id),
    closedHow: text('closed_how', { enum: ['closed', 'no_answer_needed'] }),
    idempotencyKey: text('idempotency_key').notNull(),
    lastLetterAt: instant('last_letter_at').notNull(),
    createdAt: createdAt(),
  },
  (t) => [
    index('questions_build').on(t.buildId, t.lastLetterAt),
    index('questions_pen').on(t.penHolderId, t.state, t.lastLetterAt),
    index('questions_state').on(t.state, t.lastLetterAt),
    index('questions_due').on(t.state, t.dueAt),
    uniqueIndex('questions_idempotency_unique').on(t.askedById, t.idempotencyKey),
    check('questions_state_known', sql`${t.state} in ('waiting', 'answered', 'closed')`),
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
    /** Until then its author can correct it; its mail goes out after. */
    correctableUntilAt: instant('correctable_until_at'),
    correctedAt: instant('corrected_at'),
    arrivedBy: text('arrived_by', { enum: ['page', 'mail'] })
      .notNull()
      .default('page'),
  },
  (t) => [
    index('letters_question').on(t.questionId, t.writtenAt),
    uniqueIndex('letters_idempotency_unique').on(t.authorId, t.idempotencyKey),
    check('letters_side_known', sql`${t.side} in ('client', 'shop')`),
  ],
);

/** Every change of who holds the pen; without `by_id` the routing did it, and the reason says whom it passed over. */
export const penPasses = sqliteTable(
  'pen_passes',
  {
    id: id(),
    questionId: text('question_id')
      .notNull()
      .references(() => questions.id, { onDelete: 'cascade' }),
    fromId: text('from_id').references(() => users.id),
    toId: text('to_id').references(() => users.id),
    byId: text('by_id').references(() => users.id),
    reason: text('reason').notNull(),
    passedAt: instant('passed_at').notNull(),
  },
  (t) => [index('pen_passes_question').on(t.questionId, t.passedAt)],
);

/** The shop margin: notes beside a question that only the staff on the build read. */
export const marginNotes = sqliteTable(
  'margin_notes',
  {
    id: id(),
    questionId: text('question_id')
      .notNull()
      .references(() => questions.id, { onDelete: 'cascade' }),
    authorId: text('author_id')
      .notNull()
      .references(() => users.id),
    body: text('body').notNull(),
    bodyText: text('body_text').notNull(),
    idempotencyKey: text('idempotency_key').notNull(),
    writtenAt: instant('written_at').notNull(),
  },
  (t) => [
    index('margin_notes_question').on(t.questionId, t.writtenAt),
    uniqueIndex('margin_notes_idempotency_unique').on(t.authorId, t.idempotencyKey),
  ],
);

/** How far each person has read a question. */
export const questionReads = sqliteTable(
  'question_reads',
  {
    questionId: text('question_id')
      .notNull()
      .references(() => questions.id, { onDelete: 'cascade' }),
    userId: text('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    readAt: instant('read_at').notNull(),
  },
  (t) => [primaryKey({ columns: [t.questionId, t.userId] })],
);

/** A phrase kept for letters, with fields such as {owner} to be filled in; without an owner it is the shop's. */
export const savedPhrases = sqliteTable(
  'saved_phrases',
  {
    id: id(),
    ownerId: text('owner_id').references(() => users.id, { onDelete: 'cascade' }),
    title: text('title').notNull(),
    words: text('words').notNull(),
    createdAt: createdAt(),
  },
  (t) => [index('saved_phrases_owner').on(t.ownerId, t.title)],
);
