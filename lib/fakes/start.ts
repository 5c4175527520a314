import { join } from 'node:path';
import type { RunningFake } from './loopback';
import { startMailRoom } from './mail-room/server';
import type { WebhookTarget } from './mail-room/webhooks';
import { startObjectStore } from './object-store/server';

const NAMES = [
  'APP_URL',
  'S3_REGION',
  'S3_BUCKET',
  'S3_ACCESS_KEY_ID',
  'S3_SECRET_ACCESS_KEY',
  'RESEND_API_KEY',
] as const;

function requireSettings(): Record<(typeof NAMES)[number], string> {
  const missing = NAMES.filter((name) => !process.env[name]);
  if (missing.length > 0) throw new Error(`Set ${missing.join(', ')} before starting the local stand-ins.`);
  const valueOf = (name: (typeof NAMES)[number]) => process.env[name] ?? '';
  return {
    APP_URL: valueOf('APP_URL'),
    S3_REGION: valueOf('S3_REGION'),
    S3_BUCKET: valueOf('S3_BUCKET'),
    S3_ACCESS_KEY_ID: valueOf('S3_ACCESS_KEY_ID'),
    S3_SECRET_ACCESS_KEY: valueOf('S3_SECRET_ACCESS_KEY'),
    RESEND_API_KEY: valueOf('RESEND_API_KEY'),
  };
}

/** The port of a local address. A hosted service's address is refused: a stand-in beside it would only mislead. */
function localPort(name: string, fallback: number): number {
  const address = process.env[name];
  if (!address) return fallback;
  const { hostname, port } = new URL(address);
  if (hostname !== '127.0.0.1' && hostname !== 'localhost')
    throw new Error(`${name} is not an address of this machine.`);
  return Number(port || 80);
}

/** The program's door for the provider, where it has a secret to check what comes in. */
function webhookTarget(appUrl: string): WebhookTarget | undefined {
  const secret = process.env.RESEND_WEBHOOK_SECRET;
  return secret ? { url: new URL('/api/webhooks/mail', appUrl).href, secret } : undefined;
}

async function startFakes(): Promise<RunningFake[]> {
  const settings = requireSettings();
  const folder = process.env.FAKES_DIR || '.data';
  const objectStore = await startObjectStore({
    port: localPort('S3_ENDPOINT', 4568),
    dataDir: join(folder, 'objects'),
    region: settings.S3_REGION,
    credentials: { accessKeyId: settings.S3_ACCESS_KEY_ID, secretAccessKey: settings.S3_SECRET_ACCESS_KEY },
    buckets: [settings.S3_BUCKET],
    allowedOrigins: [new URL(settings.APP_URL).origin],
  });
  console.log(`Object store: ${objectStore.url}, bucket ${settings.S3_BUCKET}`);
  const mailRoom = await startMailRoom({
    port: localPort('RESEND_BASE_URL', 4569),
    dataDir: join(folder, 'mails'),
    apiKey: settings.RESEND_API_KEY,
    webhook: webhookTarget(settings.APP_URL),
  });
  console.log(`Mail room: ${mailRoom.url}`);
  return [objectStore, mailRoom];
}

const fakes = await startFakes();
const stop = async () => {
  await Promise.all(fakes.map((fake) => fake.close()));
  process.exit(0);
};
process.once('SIGTERM', () => void stop());
process.once('SIGINT', () => void stop());
process.once('disconnect', () => void stop());
process.send?.('ready');
