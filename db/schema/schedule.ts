import { sql } from 'drizzle-orm';
import { check, index, integer, primaryKey, real, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { id, instant } from './columns';
import { builds, buildStages } from './builds';
import { users } from './users';
import type { KeptGrounds } from '../../lib/floor/grounds';
import type { CurvePoint } from '../../lib/schedule/ready-window';

/** When the shop works, in its own zone: one row for each stretch of a weekday; 1 is Monday, 7 is Sunday (ISO 8601). */
export const workingHours = sqliteTable(
  'working_hours',
  {
    weekday: integer('weekday').notNull(),
    opensAtMin: integer('opens_at_min').notNull(),
    closesAtMin: integer('closes_at_min').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.weekday, t.opensAtMin] }),
    check('working_hours_weekday_range', sql`${t.weekday} between 1 and 7`),
    check(
      'working_hours_order',
      sql`${t.opensAtMin} >= 0 and ${t.opensAtMin} < ${t.closesAtMin} and ${t.closesAtMin} <= 1440`,
    ),
  ],
);

/** Days, both included, on which the shop is closed, or closes early; yyyy-mm-dd. */
export const closures = sqliteTable(
  'closures',
  {
    id: id(),
    startsOn: text('starts_on').notNull(),
    endsOn: text('ends_on').notNull(),
    name: text('name').notNull(),
    /** A half day: work ends at this minute. Null: closed all day. */
    closesAtMin: integer('closes_at_min'),
    /** From the country's list of holidays, and replaced with it. */
    isHoliday: integer('is_holiday', { mode: 'boolean' }).notNull().default(false),
  },
  (t) => [index('closures_days').on(t.startsOn, t.endsOn), check('closures_order', sql`${t.startsOn} <= ${t.endsOn}`)],
);

/** The window given for a build on a day: kept, so that a change can be explained and past windows judged. */
export const readyWindows = sqliteTable(
  'ready_windows',
  {
    buildId: text('build_id')
      .notNull()
      .references(() => builds.id, { onDelete: 'cascade' }),
    /** The shop's day, yyyy-mm-dd. */
    givenOn: text('given_on').notNull(),
    stageKey: text('stage_key').notNull(),
    kind: text('kind', { enum: ['window', 'waiting', 'unsayable'] }).notNull(),
    earliestOn: text('earliest_on'),
    likelyOn: text('likely_on'),
    latestOn: text('latest_on'),
    /** What it waits for ("the finish sample"), or why nothing can be said. */
    words: text('words'),
    /** What the shown window was widened by against the bare one, for calibration. */
    widenedBy: real('widened_by').notNull().default(1),
    /** The bare window and the yardstick of its adjustment, so that the next adjustment can be measured. */
    rawEarliestOn: text('raw_earliest_on'),
    rawLatestOn: text('raw_latest_on'),
    yardstickDays: real('yardstick_days'),
    /** Kept of a build's latest window, and of the first in each stage. */
    curve: text('curve', { mode: 'json' }).$type<CurvePoint[]>(),
    /** What it rested on, to explain the next by; null of a window that nothing will be compared with. */
    grounds: text('grounds', { mode: 'json' }).$type<KeptGrounds>(),
    /** Why it moved against the one before, in a sentence; null when it did not. */
    movedWhy: text('moved_why'),
    computedAt: instant('computed_at').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.buildId, t.givenOn] }),
    index('ready_windows_stage').on(t.stageKey, t.givenOn),
    check('ready_windows_kind_known', sql`${t.kind} in ('window', 'waiting', 'unsayable')`),
  ],
);

/** Every move of a build to another stage; `before` is what undo puts back. */
export const stageMoves = sqliteTable(
  'stage_moves',
  {
    id: id(),
    buildId: text('build_id')
      .notNull()
      .references(() => builds.id, { onDelete: 'cascade' }),
    fromStageId: text('from_stage_id').references(() => buildStages.id),
    toStageId: text('to_stage_id')
      .notNull()
      .references(() => buildStages.id),
    /** A move back has one. */
    reason: text('reason'),
    before: text('before', { mode: 'json' })
      .$type<{ id: string; startedAt: number | null; finishedAt: number | null }[]>()
      .notNull(),
    movedById: text('moved_by_id')
      .notNull()
      .references(() => users.id),
    movedAt: instant('moved_at').notNull(),
    undoneAt: instant('undone_at'),
  },
  (t) => [index('stage_moves_build').on(t.buildId, t.movedAt)],
);

/** A reminder that a build has gone quiet: level 1 to the holder of its stage, level 2 to its rep, once a silence. */
export const quietReminders = sqliteTable(
  'quiet_reminders',
  {
    id: id(),
    buildId: text('build_id')
      .notNull()
      .references(() => builds.id, { onDelete: 'cascade' }),
    /** When the owner last saw something new. */
    silentSinceAt: instant('silent_since_at').notNull(),
    level: integer('level').notNull(),
    userId: text('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    remindedAt: instant('reminded_at').notNull(),
  },
  (t) => [
    uniqueIndex('quiet_reminders_once').on(t.buildId, t.silentSinceAt, t.level, t.userId),
    index('quiet_reminders_user').on(t.userId, t.remindedAt),
  ],
);
