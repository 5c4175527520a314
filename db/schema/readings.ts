import { index, integer, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { createdAt, id } from './columns';
import { builds } from './builds';
import { entries } from './entries';
import { users } from './users';
import type { ReadingValue, ShownReading } from '../../lib/readings/reading';

/** A number taken at the bench, carried by an entry; `item_key` names the spec item it measures. */
export const readings = sqliteTable(
  'readings',
  {
    id: id(),
    entryId: text('entry_id')
      .notNull()
      .references(() => entries.id, { onDelete: 'cascade' }),
    buildId: text('build_id')
      .notNull()
      .references(() => builds.id, { onDelete: 'cascade' }),
    position: integer('position').notNull(),
    value: text('value', { mode: 'json' }).$type<ReadingValue>().notNull(),
    /** What the diary says of it, computed when it was taken, against the spec as it was then. */
    shown: text('shown', { mode: 'json' }).$type<ShownReading>(),
    itemKey: text('item_key'),
  },
  (t) => [index('readings_entry').on(t.entryId, t.position), index('readings_build').on(t.buildId, t.itemKey)],
);

/** An entry, or one reading of it, that shows a spec item was built as signed. */
export const proofs = sqliteTable(
  'proofs',
  {
    id: id(),
    buildId: text('build_id')
      .notNull()
      .references(() => builds.id, { onDelete: 'cascade' }),
    itemKey: text('item_key').notNull(),
    /** What the spec called the item when the entry showed it; empty where that was not written down. */
    label: text('label').notNull().default(''),
    entryId: text('entry_id')
      .notNull()
      .references(() => entries.id, { onDelete: 'cascade' }),
    createdById: text('created_by_id')
      .notNull()
      .references(() => users.id),
    createdAt: createdAt(),
  },
  (t) => [
    uniqueIndex('proofs_item_entry_unique').on(t.buildId, t.itemKey, t.entryId),
    index('proofs_entry').on(t.entryId),
  ],
);
