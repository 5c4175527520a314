import { sql } from 'drizzle-orm';
import { check, index, integer, primaryKey, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { createdAt, id, instant } from './columns';
import { users } from './users';
import { mailKinds, type FrozenMail, type MailAbout } from '../../lib/mail/kinds';

/** How one person wants the diary by mail, and how far their digests have told it. */
export const mailSettings = sqliteTable(
  'mail_settings',
  {
    userId: text('user_id')
      .primaryKey()
      .references(() => users.id, { onDelete: 'cascade' }),
    cadence: text('cadence', { enum: ['at_once', 'daily', 'weekly', 'none'] }).notNull(),
    hourLocal: integer('hour_local').notNull().default(8),
    /** 1 is Monday, 7 is Sunday (ISO 8601). */
    weekday: integer('weekday').notNull().default(5),
    /** Local hours between which nothing is sent but sign-in mail; null: no quiet hours. */
    quietFromHour: integer('quiet_from_hour'),
    quietToHour: integer('quiet_to_hour'),
    nextDigestAt: instant('next_digest_at'),
    /** The last diary event that a digest has told. */
    toldSeq: integer('told_seq').notNull().default(0),
    leaseOwner: text('lease_owner'),
    leaseEndsAt: instant('lease_ends_at'),
  },
  (t) => [
    index('mail_settings_due').on(t.nextDigestAt),
    check('mail_settings_cadence_known', sql`${t.cadence} in ('at_once', 'daily', 'weekly', 'none')`),
    check('mail_settings_hour_range', sql`${t.hourLocal} between 0 and 23`),
    check('mail_settings_weekday_range', sql`${t.weekday} between 1 and 7`),
  ],
);

/**
 * Mail to be sent. A row is written with the event it tells of and holds only ids; the sender reads them as its reader,
 * and freezes the bytes before the first try, so that every try sends the same. parked: the provider's answer was not
 * learnt within a day; failed: refused, or given up; dropped: its reader lost the right to it before it went out.
 */
export const outbox = sqliteTable(
  'outbox',
  {
    id: id(),
    kind: text('kind', { enum: mailKinds }).notNull(),
    userId: text('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    about: text('about', { mode: 'json' }).$type<MailAbout>().notNull(),
    state: text('state', { enum: ['waiting', 'sending', 'sent', 'failed', 'parked', 'dropped'] }).notNull(),
    /** Unique: one event writes one mail to one person, however often it is tried. */
    dedupeKey: text('dedupe_key').notNull(),
    frozen: text('frozen', { mode: 'json' }).$type<FrozenMail>(),
    attempts: integer('attempts').notNull().default(0),
    nextAttemptAt: instant('next_attempt_at').notNull(),
    firstAttemptAt: instant('first_attempt_at'),
    leaseOwner: text('lease_owner'),
    leaseEndsAt: instant('lease_ends_at'),
    lastProblem: text('last_problem'),
    providerId: text('provider_id'),
    sentAt: instant('sent_at'),
    /** Since then `frozen` has its headers only: what it said is composed anew where it is wanted again. */
    bodyDroppedAt: instant('body_dropped_at'),
    /** What the provider told of it afterwards. */
    deliveredAt: instant('delivered_at'),
    bouncedAt: instant('bounced_at'),
    complainedAt: instant('complained_at'),
    createdAt: createdAt(),
  },
  (t) => [
    uniqueIndex('outbox_dedupe_unique').on(t.dedupeKey),
    index('outbox_due').on(t.state, t.nextAttemptAt),
    index('outbox_user').on(t.userId, t.createdAt),
    index('outbox_provider').on(t.providerId),
    index('outbox_bodies')
      .on(t.createdAt)
      .where(sql`${t.frozen} is not null and ${t.bodyDroppedAt} is null`),
    check('outbox_state_known', sql`${t.state} in ('waiting', 'sending', 'sent', 'failed', 'parked', 'dropped')`),
  ],
);

/** How one person wants one kind of mail; no row: as the shop's defaults say. */
export const mailChoices = sqliteTable(
  'mail_choices',
  {
    userId: text('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    kind: text('kind', { enum: mailKinds }).notNull(),
    choice: text('choice', { enum: ['at_once', 'digest', 'never'] }).notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.userId, t.kind] }),
    check('mail_choices_known', sql`${t.choice} in ('at_once', 'digest', 'never')`),
  ],
);

/** Something to be told in a person's next digest instead of a mail of its own. */
export const newsItems = sqliteTable(
  'news_items',
  {
    id: id(),
    userId: text('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    kind: text('kind', { enum: mailKinds }).notNull(),
    about: text('about', { mode: 'json' }).$type<MailAbout>().notNull(),
    dedupeKey: text('dedupe_key').notNull(),
    /** Not told before this moment: what it tells of may still be corrected. */
    notBeforeAt: instant('not_before_at').notNull().default(0),
    toldAt: instant('told_at'),
    createdAt: createdAt(),
  },
  (t) => [
    uniqueIndex('news_items_dedupe_unique').on(t.dedupeKey),
    index('news_items_untold').on(t.userId, t.toldAt, t.createdAt),
    index('news_items_created').on(t.createdAt),
  ],
);

/** What the mail provider has told us by webhook, once each: replies that came in, and what became of what we sent. */
export const providerEvents = sqliteTable(
  'provider_events',
  {
    id: text('id').primaryKey(),
    kind: text('kind').notNull(),
    outcome: text('outcome').notNull(),
    /** Whom it concerns, where that is known. */
    userId: text('user_id').references(() => users.id, { onDelete: 'set null' }),
    /** Why a reply was not kept, as a sentence; no address, no text of it. */
    note: text('note'),
    receivedAt: instant('received_at').notNull(),
  },
  (t) => [index('provider_events_received').on(t.receivedAt)],
);
