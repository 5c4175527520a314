import { sql } from 'drizzle-orm';
import { check, index, integer, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { createdAt, id, instant } from './columns';
import { builds } from './builds';
import { entries } from './entries';
import { users } from './users';

/**
 * granted: an upload link was given out. uploaded: bytes have arrived, unchecked. ready: re-encoded, may be served.
 * refused: looked at and thrown away. Only `ready` photos are ever served.
 */
export const photos = sqliteTable(
  'photos',
  {
    id: id(),
    buildId: text('build_id')
      .notNull()
      .references(() => builds.id, { onDelete: 'cascade' }),
    entryId: text('entry_id').references(() => entries.id, { onDelete: 'cascade' }),
    /** A photo of a letter; its entry is null then. No foreign key: letters come after photos. */
    letterId: text('letter_id'),
    uploaderId: text('uploader_id')
      .notNull()
      .references(() => users.id),
    uploadKey: text('upload_key').notNull(),
    state: text('state', { enum: ['granted', 'uploaded', 'ready', 'refused'] }).notNull(),
    /** The file's own name, shown to its uploader only; never part of a key. */
    label: text('label').notNull(),
    contentType: text('content_type').notNull(),
    sizeBytes: integer('size_bytes').notNull(),
    sha256: text('sha256').notNull(),
    originalKey: text('original_key').notNull(),
    /** Where the re-encoded sizes lie; null until ready. */
    outPrefix: text('out_prefix'),
    widthPx: integer('width_px'),
    heightPx: integer('height_px'),
    blurDataUrl: text('blur_data_url'),
    /** Widths that exist, ascending, comma separated: a small photo has fewer. */
    variantWidthsPx: text('variant_widths_px'),
    alt: text('alt').notNull().default(''),
    position: integer('position').notNull().default(0),
    refusal: text('refusal'),
    expiresAt: instant('expires_at').notNull(),
    createdAt: createdAt(),
  },
  (t) => [
    index('photos_entry').on(t.entryId, t.position),
    index('photos_letter').on(t.letterId, t.position),
    index('photos_unfinished')
      .on(t.createdAt)
      .where(sql`${t.entryId} is null`),
    uniqueIndex('photos_upload_unique').on(t.uploaderId, t.uploadKey),
    check('photos_state_known', sql`${t.state} in ('granted', 'uploaded', 'ready', 'refused')`),
  ],
);

/** Objects to be deleted from the store, written in the transaction that made them unneeded. */
export const doomedObjects = sqliteTable(
  'doomed_objects',
  {
    key: text('key').primaryKey(),
    attempts: integer('attempts').notNull().default(0),
    nextAttemptAt: instant('next_attempt_at').notNull(),
  },
  (t) => [index('doomed_objects_due').on(t.nextAttemptAt)],
);
