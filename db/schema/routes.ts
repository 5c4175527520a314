import { integer, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { id } from './columns';
import { departments } from './shop';
import { kindsOfWork } from '../../lib/work';

/** A route is a template: the ordered stages that a kind of instrument passes. */
export const routes = sqliteTable('routes', { id: id(), name: text('name').notNull() });

export const routeStages = sqliteTable(
  'route_stages',
  {
    id: id(),
    routeId: text('route_id')
      .notNull()
      .references(() => routes.id, { onDelete: 'cascade' }),
    position: integer('position').notNull(),
    key: text('key').notNull(),
    name: text('name').notNull(),
    department: text('department')
      .notNull()
      .references(() => departments.key),
    work: text('work', { enum: kindsOfWork }).notNull().default('body'),
    usualDays: integer('usual_days').notNull(),
    /** The shop's three-point estimate in working days, used while few builds have passed. */
    bestDays: integer('best_days'),
    likelyDays: integer('likely_days'),
    worstDays: integer('worst_days'),
    /** Seasoning or cure: calendar days that cannot be hurried. */
    minimumWaitDays: integer('minimum_wait_days').notNull().default(0),
    /** The longest an owner should see nothing new while a build is here, in days. */
    silenceDays: integer('silence_days').notNull().default(14),
  },
  (t) => [uniqueIndex('route_stages_position_unique').on(t.routeId, t.position)],
);
