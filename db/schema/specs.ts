import { sql } from 'drizzle-orm';
import { check, index, integer, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { createdAt, id, instant } from './columns';
import { builds } from './builds';
import { users } from './users';
import type { SpecDocument } from '../../lib/specs/document';

/** What a new order of one instrument starts its spec from. */
export const specTemplates = sqliteTable('spec_templates', {
  id: id(),
  name: text('name').notNull(),
  document: text('document', { mode: 'json' }).$type<SpecDocument>().notNull(),
  position: integer('position').notNull(),
});

/** The spec the shop is working on: one a build. `revision` tells two editors apart. */
export const specDrafts = sqliteTable('spec_drafts', {
  buildId: text('build_id')
    .primaryKey()
    .references(() => builds.id, { onDelete: 'cascade' }),
  document: text('document', { mode: 'json' }).$type<SpecDocument>().notNull(),
  revision: integer('revision').notNull().default(1),
  editedById: text('edited_by_id')
    .notNull()
    .references(() => users.id),
  editedAt: instant('edited_at').notNull(),
});

/** A version that was sent to the client; triggers refuse any change to it. */
export const specVersions = sqliteTable(
  'spec_versions',
  {
    id: id(),
    buildId: text('build_id')
      .notNull()
      .references(() => builds.id, { onDelete: 'cascade' }),
    number: integer('number').notNull(),
    document: text('document', { mode: 'json' }).$type<SpecDocument>().notNull(),
    /** SHA-256 of the canonical document, hex. */
    contentHash: text('content_hash').notNull(),
    sentById: text('sent_by_id')
      .notNull()
      .references(() => users.id),
    sentAt: instant('sent_at').notNull(),
  },
  (t) => [uniqueIndex('spec_versions_number_unique').on(t.buildId, t.number)],
);

/** A wish for a frozen item: the shop answers with price and days, and the owner signs or lets it be. */
export const changeRequests = sqliteTable(
  'change_requests',
  {
    id: id(),
    buildId: text('build_id')
      .notNull()
      .references(() => builds.id, { onDelete: 'cascade' }),
    itemKey: text('item_key').notNull(),
    wish: text('wish').notNull(),
    state: text('state', { enum: ['asked', 'offered', 'signed', 'declined'] }).notNull(),
    askedById: text('asked_by_id')
      .notNull()
      .references(() => users.id),
    priceCents: integer('price_cents'),
    extraDays: integer('extra_days'),
    offeredById: text('offered_by_id').references(() => users.id),
    offeredAt: instant('offered_at'),
    /** Why the shop cannot do it, when it cannot. */
    answer: text('answer'),
    createdAt: createdAt(),
  },
  (t) => [
    index('change_requests_build').on(t.buildId, t.createdAt),
    check('change_requests_state_known', sql`${t.state} in ('asked', 'offered', 'signed', 'declined')`),
  ],
);
