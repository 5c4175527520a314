import { unsubscribe } from '@/db/queries/mail-settings';
import { env } from '@/lib/env';
import { readUnsubscribeToken } from '@/lib/mail/unsubscribe-token';

/**
 * One click in a mail program ends the diary mails (RFC 8058): a POST without cookies, from anywhere, that opens nothing
 * else. The same answer for a token that is not ours.
 */
export async function POST(_request: Request, { params }: { params: Promise<{ token: string }> }) {
  const userId = readUnsubscribeToken((await params).token);
  if (userId) await unsubscribe(userId);
  return new Response(null, { status: 202 });
}

/** A person who follows the address gets the page that asks; looking at it ends nothing. */
export async function GET(_request: Request, { params }: { params: Promise<{ token: string }> }) {
  return Response.redirect(`${env().APP_URL}/unsubscribe/${encodeURIComponent((await params).token)}`, 303);
}
