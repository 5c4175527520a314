import { z } from 'zod';

const loopback = ['localhost', '127.0.0.1', '[::1]'];

function isSafeAppUrl(value: string): boolean {
  const url = new URL(value);
  return url.origin === value && (url.protocol === 'https:' || loopback.includes(url.hostname));
}

const schema = z.object({
  APP_URL: z
    .url()
    .refine(
      isSafeAppUrl,
      'must be an https origin without a path, such as https://diary.example.com (http only on this machine)',
    ),
  AUTH_SECRET: z.string().min(32, 'must be at least 32 random characters'),
  DATABASE_URL: z.string().min(1),
  DATABASE_AUTH_TOKEN: z.string().optional(),
  S3_ENDPOINT: z.url(),
  S3_REGION: z.string().min(1),
  S3_BUCKET: z.string().min(1),
  S3_ACCESS_KEY_ID: z.string().min(1),
  S3_SECRET_ACCESS_KEY: z.string().min(1),
  RESEND_API_KEY: z.string().min(1),
  RESEND_BASE_URL: z.url().optional(),
  MAIL_FROM: z.string().min(3).default('Flitchbook <diary@quillhaven.example>'),
  /** Where answers by mail arrive; without it mail carries no address to reply to. */
  MAIL_REPLY_DOMAIN: z.hostname().optional(),
  RESEND_WEBHOOK_SECRET: z
    .string()
    .regex(/^whsec_[A-Za-z0-9+/]{32,}={0,2}$/, 'must be the signing secret of the webhook, whsec_ and base64')
    .optional(),
  /** Mails a second; the provider's own limit is 2 unless it was raised. Local stand-ins have none. */
  MAIL_PER_SECOND: z.coerce.number().positive().optional(),
  MAIL_AT_ONCE: z.coerce.number().int().min(1).max(64).default(8),
  PEER_ADDRESS_HEADER: z.string().optional(),
  DEMO_MAIL_ROOM_URL: z.url().optional(),
});

export type Env = z.infer<typeof schema>;

let known: Env | undefined;

/**
 * The checked environment, read once.
 * @throws Error that names every variable that is missing or wrong
 */
export function env(): Env {
  if (known) return known;
  const result = schema.safeParse(process.env);
  if (!result.success) {
    const lines = result.error.issues.map((issue) => `  ${issue.path.join('.')}: ${issue.message}`);
    throw new Error(`The configuration is incomplete:\n${lines.join('\n')}\nREADME.md lists every variable.`);
  }
  known = result.data;
  return known;
}

export const isHttps = () => env().APP_URL.startsWith('https:');
