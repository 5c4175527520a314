import { randomBytes } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';

const FILE = '.data/demo.env.json';

/** @returns {Record<string, string>} secrets of this machine's demo, made once and kept beside its data */
function ownSecrets() {
  const known = existsSync(FILE) ? JSON.parse(readFileSync(FILE, 'utf8')) : {};
  const secrets = {
    AUTH_SECRET: randomBytes(32).toString('base64url'),
    RESEND_WEBHOOK_SECRET: `whsec_${randomBytes(32).toString('base64')}`,
    ...known,
  };
  if (Object.keys(secrets).every((name) => name in known)) return known;
  mkdirSync('.data', { recursive: true });
  writeFileSync(FILE, JSON.stringify(secrets), { mode: 0o600 });
  return secrets;
}

/**
 * The environment of the demo; whatever is set already wins.
 * @returns {NodeJS.ProcessEnv}
 */
export function demoEnvironment() {
  return {
    APP_URL: 'http://127.0.0.1:3000',
    DATABASE_URL: 'file:.data/flitchbook.db',
    S3_ENDPOINT: 'http://127.0.0.1:4568',
    S3_REGION: 'us-east-1',
    S3_BUCKET: 'flitchbook',
    S3_ACCESS_KEY_ID: 'local-key',
    S3_SECRET_ACCESS_KEY: 'local-secret-for-this-machine',
    RESEND_BASE_URL: 'http://127.0.0.1:4569',
    RESEND_API_KEY: 're_local',
    MAIL_FROM: 'Quillhaven Guitar Works <diary@quillhaven.example>',
    MAIL_REPLY_DOMAIN: 'answers.quillhaven.example',
    DEMO_MAIL_ROOM_URL: 'http://127.0.0.1:4569',
    FAKES_DIR: '.data',
    NEXT_TELEMETRY_DISABLED: '1',
    ...ownSecrets(),
    ...process.env,
  };
}
