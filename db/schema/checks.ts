import { sql } from 'drizzle-orm';
import { check, index, integer, primaryKey, sqliteTable, text } from 'drizzle-orm/sqlite-core';
import { id, instant } from './columns';
import { builds, buildStages } from './builds';
import { photos } from './photos';
import { routes } from './routes';
import { users } from './users';

/** An inspection list of a route, gone through in one of its stages. */
export const checkLists = sqliteTable(
  'check_lists',
  {
    id: id(),
    routeId: text('route_id')
      .notNull()
      .references(() => routes.id, { onDelete: 'cascade' }),
    stageKey: text('stage_key').notNull(),
    name: text('name').notNull(),
    /** Taken out of use; what was inspected by it stays. */
    retiredAt: instant('retired_at'),
  },
  (t) => [index('check_lists_route').on(t.routeId, t.stageKey)],
);

export const checkLines = sqliteTable(
  'check_lines',
  {
    id: id(),
    listId: text('list_id')
      .notNull()
      .references(() => checkLists.id, { onDelete: 'cascade' }),
    position: integer('position').notNull(),
    text: text('text').notNull(),
    photoNeeded: integer('photo_needed', { mode: 'boolean' }).notNull().default(false),
    /** Removed, or reworded after it had been marked: the marks keep the words they were made on. */
    retiredAt: instant('retired_at'),
  },
  (t) => [index('check_lines_list').on(t.listId, t.position)],
);

/** One walk through a list on one build. */
export const checkRuns = sqliteTable(
  'check_runs',
  {
    id: id(),
    buildId: text('build_id')
      .notNull()
      .references(() => builds.id, { onDelete: 'cascade' }),
    stageId: text('stage_id')
      .notNull()
      .references(() => buildStages.id),
    listId: text('list_id')
      .notNull()
      .references(() => checkLists.id),
    startedById: text('started_by_id')
      .notNull()
      .references(() => users.id),
    startedAt: instant('started_at').notNull(),
    outcome: text('outcome', { enum: ['passed', 'failed'] }),
    finishedById: text('finished_by_id').references(() => users.id),
    finishedAt: instant('finished_at'),
    /** A fail sends the build back to this stage, with this reason. */
    backToStageId: text('back_to_stage_id').references(() => buildStages.id),
    reason: text('reason'),
    /** What the player is told of a fail is the rep's decision. */
    telling: text('telling', { enum: ['undecided', 'told', 'kept'] }),
    toldWords: text('told_words'),
    decidedById: text('decided_by_id').references(() => users.id),
    decidedAt: instant('decided_at'),
  },
  (t) => [
    index('check_runs_build').on(t.buildId, t.startedAt),
    index('check_runs_telling').on(t.telling),
    check('check_runs_outcome_known', sql`${t.outcome} in ('passed', 'failed')`),
  ],
);

export const checkMarks = sqliteTable(
  'check_marks',
  {
    runId: text('run_id')
      .notNull()
      .references(() => checkRuns.id, { onDelete: 'cascade' }),
    lineId: text('line_id')
      .notNull()
      .references(() => checkLines.id),
    mark: text('mark', { enum: ['pass', 'fail', 'not_applicable'] }).notNull(),
    note: text('note').notNull().default(''),
    photoId: text('photo_id').references(() => photos.id),
    markedById: text('marked_by_id')
      .notNull()
      .references(() => users.id),
    markedAt: instant('marked_at').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.runId, t.lineId] }),
    index('check_marks_photo').on(t.photoId),
    check('check_marks_known', sql`${t.mark} in ('pass', 'fail', 'not_applicable')`),
  ],
);
