import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll } from 'vitest';
import { Database } from '@/db/client';
import { migrateDatabase } from '@/db/migrate';
import { log } from '@/lib/log';

/** Every variable that lib/env.ts asks for. The two addresses lead nowhere unless a test starts a stand-in there. */
export const testEnv = {
  APP_URL: 'https://diary.example',
  AUTH_SECRET: 'only-for-tests-only-for-tests-only-for-tests',
  S3_ENDPOINT: 'http://127.0.0.1:9',
  S3_REGION: 'eu-north-1',
  S3_BUCKET: 'photos',
  S3_ACCESS_KEY_ID: 'AKEXAMPLE',
  S3_SECRET_ACCESS_KEY: 'a/secret+for=tests',
  RESEND_API_KEY: 're_local_example',
  RESEND_BASE_URL: 'http://127.0.0.1:9',
  RESEND_WEBHOOK_SECRET: 'whsec_b25seS1mb3ItdGVzdHMtb25seS1mb3ItdGVzdHMtMzI=',
  MAIL_REPLY_DOMAIN: 'answers.shop.example',
};

type TestEnv = typeof testEnv;

/**
 * A database file of this test file's own, with the real migrations, as the process's database; gone after its tests.
 * Call it once, at the top, before anything asks for the configuration: that is read once.
 */
export async function openTestDatabase(env: Partial<TestEnv> = {}): Promise<{ database: Database; file: string }> {
  const folder = mkdtempSync(join(tmpdir(), 'flitchbook-'));
  const file = join(folder, 'diary.db');
  log.level = 'silent';
  Object.assign(process.env, testEnv, env, { DATABASE_URL: `file:${file}` });
  const database = new Database(`file:${file}`);
  globalThis.flitchbookDatabase = database;
  afterAll(() => {
    database.close();
    globalThis.flitchbookDatabase = undefined;
    rmSync(folder, { recursive: true, force: true });
  });
  await migrateDatabase(database);
  return { database, file };
}
