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
    disabledAt: instant('disabled_at'),
    createdAt: createdAt(),
  },
  (t) => [
    uniqueIndex('users_email_unique').on(t.email),
    check('users_email_lower', sql`${t.email} = lower(${t.email})`),
    check('users_role_known', sql`${t.role} in ('buyer', 'artist', 'builder', 'rep', 'admin')`),
  ],
);
