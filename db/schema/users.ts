import { sql } from 'drizzle-orm';
import { check, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { createdAt, id, instant } from './columns';

/** Everybody who may sign in: there is a row from the invitation on. */
export const users = sqliteTable(
  'users',
  {
    id: id(),
    email: text('email').notNull(),
    name: text('name').notNull(),
    role: text('role', { enum: ['buyer', 'artist', 'builder', 'rep', 'admin'] }).notNull(),
    department: text('department'),
    timeZone: text('time_zone').notNull().default('UTC'),
    timeZoneAskedAt: instant('time_zone_asked_at'),
    invitedById: text('invited_by_id'),
    emailVerifiedAt: instant('email_verified_at'),
    /** Out of office between these two; questions pass them over. */
    awayFromAt: instant('away_from_at'),
    awayUntilAt: instant('away_until_at'),
    /** How numbers and dates are shown: BCP 47 locale, inches or millimetres. */
    locale: text('locale').notNull().default('en-GB'),
    units: text('units', { enum: ['in', 'mm'] })
      .notNull()
      .default('in'),
    /** Mail to this address bounced or was complained of, and stops. */
    unreachableSinceAt: instant('unreachable_since_at'),
    unreachableWhy: text('unreachable_why', { enum: ['bounced', 'complained'] }),
    disabledAt: instant('disabled_at'),
    createdAt: createdAt(),
  },
  (t) => [
    uniqueIndex('users_email_unique').on(t.email),
    check('users_email_lower', sql`${t.email} = lower(${t.email})`),
    check('users_role_known', sql`${t.role} in ('buyer', 'artist', 'builder', 'rep', 'admin')`),
  ],
);
