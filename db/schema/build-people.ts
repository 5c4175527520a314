import { sql } from 'drizzle-orm';
import { check, index, integer, primaryKey, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { createdAt, id, instant } from './columns';
import { builds } from './builds';
import { routes } from './routes';
import { users } from './users';

/** The client side of a build: its owner (a buyer or an artist) and the companions the owner lets look on. */
export const buildPeople = sqliteTable(
  'build_people',
  {
    buildId: text('build_id')
      .notNull()
      .references(() => builds.id, { onDelete: 'cascade' }),
    userId: text('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    standing: text('standing', { enum: ['owner', 'companion'] }).notNull(),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.buildId, t.userId] }),
    index('build_people_user').on(t.userId),
    uniqueIndex('build_people_owner_unique')
      .on(t.buildId)
      .where(sql`${t.standing} = 'owner'`),
    check('build_people_standing_known', sql`${t.standing} in ('owner', 'companion')`),
  ],
);

/** Staff put on one build. A row with `ended_at` is history and gives nothing. */
export const assignments = sqliteTable(
  'assignments',
  {
    id: id(),
    buildId: text('build_id')
      .notNull()
      .references(() => builds.id, { onDelete: 'cascade' }),
    userId: text('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    /** May see the build while it is held from view. */
    cleared: integer('cleared', { mode: 'boolean' }).notNull().default(false),
    /** Why an admin stepped in; the owner can read it. */
    stepInReason: text('step_in_reason'),
    assignedById: text('assigned_by_id').references(() => users.id),
    startedAt: instant('started_at').notNull(),
    endedAt: instant('ended_at'),
  },
  (t) => [
    uniqueIndex('assignments_live_unique')
      .on(t.buildId, t.userId)
      .where(sql`${t.endedAt} is null`),
    index('assignments_user').on(t.userId, t.endedAt),
  ],
);

/** A rule that assigns builds as they arrive: every build of a route, in a stage, or both. Never one held from view. */
export const standingAssignments = sqliteTable(
  'standing_assignments',
  {
    id: id(),
    userId: text('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    routeId: text('route_id').references(() => routes.id),
    stageKey: text('stage_key'),
    assignedById: text('assigned_by_id').references(() => users.id),
    startedAt: instant('started_at').notNull(),
    endedAt: instant('ended_at'),
  },
  (t) => [index('standing_assignments_user').on(t.userId, t.endedAt)],
);
