import { sql } from 'drizzle-orm';
import { check, index, integer, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { createdAt, id, instant } from './columns';
import { builds } from './builds';
import { photos } from './photos';
import { changeRequests, specVersions } from './specs';
import { users } from './users';

/** A drawing or a sample to be signed: a PDF in the store, or a photo that went through the photo pipeline. */
export const documents = sqliteTable(
  'documents',
  {
    id: id(),
    buildId: text('build_id')
      .notNull()
      .references(() => builds.id, { onDelete: 'cascade' }),
    kind: text('kind', { enum: ['drawing', 'sample'] }).notNull(),
    title: text('title').notNull(),
    itemKey: text('item_key'),
    photoId: text('photo_id').references(() => photos.id),
    objectKey: text('object_key'),
    sizeBytes: integer('size_bytes'),
    /** Of the very bytes that are shown, hex; until a PDF has been checked, of those that were promised. */
    sha256: text('sha256'),
    state: text('state', { enum: ['granted', 'ready', 'refused'] }).notNull(),
    refusal: text('refusal'),
    uploaderId: text('uploader_id')
      .notNull()
      .references(() => users.id),
    uploadKey: text('upload_key').notNull(),
    expiresAt: instant('expires_at').notNull(),
    createdAt: createdAt(),
  },
  (t) => [
    index('documents_build').on(t.buildId, t.createdAt),
    index('documents_photo').on(t.photoId),
    uniqueIndex('documents_upload_unique').on(t.uploaderId, t.uploadKey),
    check('documents_state_known', sql`${t.state} in ('granted', 'ready', 'refused')`),
  ],
);

/**
 * One thing put before the owner to be signed. What it is of is named by exactly one of the subject columns, and
 * `content_hash` fixes what that was. superseded: the thing changed and was asked again; withdrawn: the shop took it back.
 */
export const signOffs = sqliteTable(
  'sign_offs',
  {
    id: id(),
    buildId: text('build_id')
      .notNull()
      .references(() => builds.id, { onDelete: 'cascade' }),
    kind: text('kind', { enum: ['spec', 'drawing', 'sample', 'change', 'concession'] }).notNull(),
    title: text('title').notNull(),
    /** The rep's words to the owner. */
    message: text('message').notNull().default(''),
    specVersionId: text('spec_version_id').references(() => specVersions.id),
    documentId: text('document_id').references(() => documents.id),
    changeRequestId: text('change_request_id').references(() => changeRequests.id),
    /** The spec item that a concession lets pass. */
    itemKey: text('item_key'),
    /** What a concession says, word for word: signed value, measured value, reason. */
    concession: text('concession', { mode: 'json' }).$type<{ signed: string; measured: string; reason: string }>(),
    contentHash: text('content_hash').notNull(),
    /** The sign-off of the same thing that stood here before: a change asks again, and the chain stays to be read. */
    replacesId: text('replaces_id'),
    /** The day it is asked for by, as yyyy-mm-dd in the shop's zone. */
    dueOn: text('due_on').notNull(),
    blocksStageKey: text('blocks_stage_key'),
    state: text('state', { enum: ['asked', 'signed', 'change_asked', 'superseded', 'withdrawn'] }).notNull(),
    askedById: text('asked_by_id')
      .notNull()
      .references(() => users.id),
    askedAt: instant('asked_at').notNull(),
    answeredById: text('answered_by_id').references(() => users.id),
    /** When its wait ended: answered, taken back, or superseded, which nobody answers. */
    answeredAt: instant('answered_at'),
    /** The name the owner typed. */
    signedName: text('signed_name'),
    /** The owner's words when they asked for a change. */
    answer: text('answer'),
    /** Hash of the session it was answered from. */
    sessionHash: text('session_hash'),
    remindedAt: instant('reminded_at'),
  },
  (t) => [
    index('sign_offs_build').on(t.buildId, t.askedAt),
    index('sign_offs_open').on(t.state, t.dueOn),
    index('sign_offs_document').on(t.documentId),
    index('sign_offs_replaces').on(t.replacesId),
    check('sign_offs_state_known', sql`${t.state} in ('asked', 'signed', 'change_asked', 'superseded', 'withdrawn')`),
    check('sign_offs_signed_has_name', sql`${t.state} <> 'signed' or ${t.signedName} is not null`),
  ],
);
