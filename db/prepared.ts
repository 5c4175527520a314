import { sql, type Placeholder } from 'drizzle-orm';
import { db, type Db } from './client';
import type { Role } from '@/lib/access';

/**
 * A query whose text is built once for each database instead of once a request: on the doors that are asked every few
 * seconds, building it costs more than SQLite takes to answer. What differs goes in by `sql.placeholder`.
 */
export function prepared<Query>(build: (on: Db) => Query): () => Query {
  const built = new WeakMap<Db, Query>();
  return () => {
    const on = db();
    const query = built.get(on) ?? build(on);
    built.set(on, query);
    return query;
  };
}

/** Whoever has this role: the person is given with the query, as `viewerId`. */
type ReaderOfRole = { id: Placeholder<'viewerId'>; role: Role };

/** The same for a query that a viewer scopes: a role decides the shape of the conditions, so each has a text of its own. */
export function preparedByRole<Query>(build: (on: Db, reader: ReaderOfRole) => Query): (role: Role) => Query {
  const queries = new Map<Role, () => Query>();
  return (role) => {
    const query = queries.get(role) ?? prepared((on) => build(on, { id: sql.placeholder('viewerId'), role }));
    queries.set(role, query);
    return query();
  };
}
