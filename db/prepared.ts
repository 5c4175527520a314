import { db, type Db } from './client';

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
