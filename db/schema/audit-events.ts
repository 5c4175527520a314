import { index, integer, sqliteTable, text } from 'drizzle-orm/sqlite-core';
import { instant } from './columns';

/**
 * Append-only, chained by hash: triggers refuse update, delete and replace. Ids only: no names, addresses or texts
 * beyond a reason somebody gave to be read. No foreign keys: history outlives what it tells of.
 */
export const auditEvents = sqliteTable(
  'audit_events',
  {
    seq: integer('seq').primaryKey({ autoIncrement: true }),
    at: instant('at').notNull(),
    actorId: text('actor_id'),
    action: text('action').notNull(),
    buildId: text('build_id'),
    subjectId: text('subject_id'),
    outcome: text('outcome', { enum: ['done', 'refused'] }).notNull(),
    reason: text('reason'),
    previousHash: text('previous_hash').notNull(),
    hash: text('hash').notNull(),
  },
  (t) => [index('audit_events_build').on(t.buildId, t.seq), index('audit_events_actor').on(t.actorId, t.seq)],
);
