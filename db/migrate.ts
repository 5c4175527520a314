import { join } from 'node:path';
import { sql } from 'drizzle-orm';
import { migrate } from 'drizzle-orm/libsql/migrator';
import type { Database } from './client';

/**
 * Brings the database to the schema this code expects, then checks what a crash or a careless copy could have broken.
 * @throws Error when the file is damaged or a foreign key points nowhere
 */
export async function migrateDatabase({ client, db }: Database): Promise<void> {
  if (client.protocol === 'file') await client.execute('PRAGMA journal_mode = WAL');
  await migrate(db, { migrationsFolder: join(/* turbopackIgnore: true */ process.cwd(), 'db/migrations') });
  const check = await db.get<{ quick_check: string }>(sql`PRAGMA quick_check(1)`);
  if (check.quick_check !== 'ok') throw new Error(`The database is damaged: ${check.quick_check}. Restore a backup.`);
  const orphans = await db.all(sql`select 1 as found from pragma_foreign_key_check limit 1`);
  if (orphans.length > 0)
    throw new Error('The database has rows that point nowhere (PRAGMA foreign_key_check). Restore a backup.');
}
