import { sql } from 'drizzle-orm';
import { check, integer, sqliteTable, text } from 'drizzle-orm/sqlite-core';
import { instant } from './columns';

/** The one row that says whose shop this is. */
export const shop = sqliteTable(
  'shop',
  {
    id: integer('id').primaryKey(),
    name: text('name').notNull(),
    timeZone: text('time_zone').notNull(),
    /** ISO 3166 codes of where the shop is, for its public holidays. */
    holidayCountry: text('holiday_country'),
    holidayRegion: text('holiday_region'),
    /** Who gets a question that nobody else can answer. No foreign key: users come after the shop. */
    fallbackUserId: text('fallback_user_id'),
    /** When the calendar, an estimate or a route last changed: windows from before it are out of date. */
    scheduleChangedAt: instant('schedule_changed_at').notNull().default(0),
    /** When a ready window was last computed. */
    windowsComputedAt: instant('windows_computed_at').notNull().default(0),
  },
  (t) => [check('shop_single', sql`${t.id} = 1`)],
);

export const departments = sqliteTable('departments', {
  key: text('key').primaryKey(),
  name: text('name').notNull(),
  position: integer('position').notNull(),
  /** Who answers when no builder of the department is on the build. */
  leadId: text('lead_id'),
  /** Builds a week that it can finish; null: not known. */
  capacityPerWeek: integer('capacity_per_week'),
});
