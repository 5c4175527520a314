import { takeWebhook } from '@/lib/jobs/take-webhook';
import { wakeMail } from '@/lib/jobs/run';
import { readLimited } from '@/lib/mail/limited-body';
import { readWebhook, WEBHOOK_LIMIT_BYTES } from '@/lib/mail/webhook';

const answer = (status: number, body: object = {}, headers: HeadersInit = {}) =>
  Response.json(body, {
    status,
    headers: { 'Cache-Control': 'no-store', 'X-Content-Type-Options': 'nosniff', ...headers },
  });

/**
 * What the mail provider tells: answers that came in, and what became of what was sent. Open to all, heard only with the
 * provider's signature over the raw body; 503 asks for it again later.
 */
export async function POST(request: Request) {
  const promised = Number(request.headers.get('content-length') ?? 0);
  const body = promised > WEBHOOK_LIMIT_BYTES ? null : await readLimited(request.body, WEBHOOK_LIMIT_BYTES);
  if (!body) return answer(413, { message: 'That is too long for a webhook.' });
  const webhook = readWebhook(body.toString('utf8'), request.headers);
  if (!webhook) return answer(401, { message: 'The signature does not hold.' });
  if (!(await takeWebhook(webhook, Date.now()))) return answer(503, {}, { 'Retry-After': '60' });
  wakeMail();
  return answer(200);
}
