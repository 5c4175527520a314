import { integer, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { id } from './columns';
import { departments } from './shop';

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
    usualDays: integer('usual_days').notNull(),
  },
  (t) => [uniqueIndex('route_stages_position_unique').on(t.routeId, t.position)],
);
