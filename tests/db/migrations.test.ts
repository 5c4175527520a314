import { getTableColumns, getTableName, is, sql } from 'drizzle-orm';
import { getTableConfig, SQLiteTable } from 'drizzle-orm/sqlite-core';
import { describe, expect, test } from 'vitest';
import { db } from '@/db/client';
import { migrateDatabase } from '@/db/migrate';
import * as schema from '@/db/schema';
import { openTestDatabase } from '../support/database';

const { database } = await openTestDatabase();
const tables = Object.values(schema).filter((value) => is(value, SQLiteTable));

describe('the migrations', () => {
  test('make every table of the schema in an empty file, with exactly its columns', async () => {
    for (const table of tables) {
      const name = getTableName(table);
      const made = await db().all<{ name: string; notnull: number; pk: number }>(
        sql`select * from pragma_table_info(${name})`,
      );
      const wanted = Object.values(getTableColumns(table)).map((column) => column.name);
      expect({ name, columns: made.map((column) => column.name).sort() }).toEqual({ name, columns: wanted.sort() });
    }
  });

  test('make every index of the schema', async () => {
    const made = await db().all<{ name: string }>(
      sql`select name from sqlite_master where type = 'index' and sql is not null`,
    );
    const wanted = tables.flatMap((table) => getTableConfig(table).indexes.map(({ config }) => config.name));
    expect(made.map(({ name }) => name).sort()).toEqual(wanted.sort());
  });

  test('leave no table that the schema does not know, the full-text index and its parts aside', async () => {
    const made = await db().all<{ name: string }>(
      sql`select name from sqlite_master where type = 'table' and name not like 'sqlite\\_%' escape '\\' and name not like '\\_\\_drizzle%' escape '\\' and name not like 'search\\_index%' escape '\\'`,
    );
    expect(made.map(({ name }) => name).sort()).toEqual(tables.map(getTableName).sort());
  });

  test('applied once more change nothing', async () => {
    const everything = sql`select type, name, sql from sqlite_master order by type, name`;
    const before = await db().all(everything);
    await migrateDatabase(database);
    await migrateDatabase(database);
    expect(await db().all(everything)).toEqual(before);
  });

  test('leave the file in the journal mode that one owning process wants, with foreign keys enforced', async () => {
    expect(await db().all(sql`PRAGMA journal_mode`)).toEqual([{ journal_mode: 'wal' }]);
    expect(await db().all(sql`PRAGMA foreign_keys`)).toEqual([{ foreign_keys: 1 }]);
    expect(await db().all(sql`PRAGMA synchronous`)).toEqual([{ synchronous: 2 }]);
  });

  test('refuse to start on rows that point nowhere', async () => {
    await database.client.executeMultiple(
      `PRAGMA foreign_keys = OFF; INSERT INTO sessions VALUES ('s', 'h', 'nobody', 'd', 0, 0, 0, 0); PRAGMA foreign_keys = ON;`,
    );
    await expect(migrateDatabase(database)).rejects.toThrow('point nowhere');
    await database.client.execute(`DELETE FROM sessions WHERE id = 's'`);
    await migrateDatabase(database);
  });
});
