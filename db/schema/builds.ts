import { index, integer, real, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { createdAt, id, instant } from './columns';
import { routes } from './routes';
import { departments } from './shop';
import { kindsOfWork } from '../../lib/work';

export const builds = sqliteTable(
  'builds',
  {
    id: id(),
    orderNumber: text('order_number').notNull(),
    instrument: text('instrument').notNull(),
    finishName: text('finish_name').notNull(),
    finishHex: text('finish_hex').notNull(),
    scaleLengthIn: real('scale_length_in').notNull(),
    rack: text('rack'),
    routeId: text('route_id')
      .notNull()
      .references(() => routes.id),
    /** Buyer entries of builders wait for a rep's release when set. */
    releaseNeeded: integer('release_needed', { mode: 'boolean' }).notNull().default(false),
    /** Under secrecy until this instant; null when open. */
    heldUntilAt: instant('held_until_at'),
    orderedAt: instant('ordered_at').notNull(),
    /** When the final check passed. */
    readyAt: instant('ready_at'),
    shippedAt: instant('shipped_at'),
    /** Carrier and number, for the owner. */
    shippedBy: text('shipped_by'),
    deliveredAt: instant('delivered_at'),
    /** Grows with everything that changes a page of the diary; the diary's ETag is made of it. */
    diaryRevision: integer('diary_revision').notNull().default(0),
    createdAt: createdAt(),
  },
  (t) => [
    uniqueIndex('builds_order_number_unique').on(t.orderNumber),
    index('builds_delivered').on(t.deliveredAt, t.orderNumber),
    index('builds_route').on(t.routeId),
  ],
);

/** The stages of one build, copied from its route when the order is entered. */
export const buildStages = sqliteTable(
  'build_stages',
  {
    id: id(),
    buildId: text('build_id')
      .notNull()
      .references(() => builds.id, { onDelete: 'cascade' }),
    position: integer('position').notNull(),
    key: text('key').notNull(),
    name: text('name').notNull(),
    department: text('department')
      .notNull()
      .references(() => departments.key),
    work: text('work', { enum: kindsOfWork }).notNull().default('body'),
    usualDays: integer('usual_days').notNull(),
    startedAt: instant('started_at'),
    finishedAt: instant('finished_at'),
  },
  (t) => [uniqueIndex('build_stages_position_unique').on(t.buildId, t.position)],
);
