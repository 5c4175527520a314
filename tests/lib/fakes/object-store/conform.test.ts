import { execFile } from 'node:child_process';
import { join } from 'node:path';
import { promisify } from 'node:util';
import { expect, test } from 'vitest';
import { BUCKET, CREDENTIALS, startTestStore } from './fixture';

const SCRIPT = join(import.meta.dirname, '../../../support/s3-conform.mjs');

test('the store behaves as S3 does in all 41 checks, refusals included', async () => {
  const { url, stop } = await startTestStore({ region: 'us-east-1', allowedOrigins: ['http://127.0.0.1:3000'] });
  const args = [SCRIPT, url, CREDENTIALS.accessKeyId, CREDENTIALS.secretAccessKey, BUCKET];
  const { stdout } = await promisify(execFile)(process.execPath, args).finally(stop);
  expect(stdout).not.toMatch(/^FAIL/m);
  expect(stdout.trim().split('\n').at(-1)).toBe('41 passed, 0 failed');
});
