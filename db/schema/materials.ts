import { sql } from 'drizzle-orm';
import { check, integer, real, sqliteTable, text } from 'drizzle-orm/sqlite-core';

/** Woods, skins and shell a spec can name. Papers: the shop must ask its authority before it crosses a border. */
export const materials = sqliteTable(
  'materials',
  {
    key: text('key').primaryKey(),
    name: text('name').notNull(),
    kind: text('kind', { enum: ['wood', 'skin', 'shell', 'other'] }).notNull(),
    papersMayBeNeeded: integer('papers_may_be_needed', { mode: 'boolean' }).notNull(),
    /** Change of width per point of moisture, quarter-sawn and flat-sawn, as a share; null where none is published. */
    radialCoefficient: real('radial_coefficient'),
    tangentialCoefficient: real('tangential_coefficient'),
  },
  (t) => [check('materials_kind_known', sql`${t.kind} in ('wood', 'skin', 'shell', 'other')`)],
);
