import { sql, type SQL } from 'drizzle-orm';

/**
 * A subquery as a field of a select. drizzle leaves the table off every column of such a field when the select has one
 * table only, and `users.id` becomes the `id` of whatever the subquery reads; one level deeper the names stay whole.
 */
export const correlated = <T>(subquery: SQL<T>): SQL<T> => sql<T>`${subquery}`;
