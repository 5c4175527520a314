import { asc } from 'drizzle-orm';
import { db } from '../client';
import { departments } from '../schema';

/** The departments of the shop, in the order in which work comes to them. */
export function listDepartments() {
  return db()
    .select({ key: departments.key, name: departments.name })
    .from(departments)
    .orderBy(asc(departments.position));
}
