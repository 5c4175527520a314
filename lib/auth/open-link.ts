import 'server-only';
import NextAuth from 'next-auth';
import { NextRequest } from 'next/server';
import { cookies } from 'next/headers';
import { z } from 'zod';
import { askingBrowserCookieName, sessionCookieName } from './cookies';
import { deviceWords } from './device';
import { isSameOrigin } from './origin';
import { authOptions } from './options';
import { peerKey } from './peer';
import { authAdapter } from '@/db/auth-adapter';
import { claimLink, type Claim } from '@/db/queries/sign-in';
import { env } from '@/lib/env';

const presented = z.union([
  z.strictObject({ token: z.string().min(20).max(100) }),
  z.strictObject({ code: z.string().regex(/^\d{6}$/) }),
]);

const sentences = {
  expired: 'This link has been used or is older than ten minutes. Ask for a new one.',
  other_browser:
    'You asked for this link in another browser. Go back to it and type the code from the same mail there, or ask for a new link here.',
  wrong_code:
    'That is not the code from the newest mail, or it is older than ten minutes. Check it, or ask for a new one.',
  too_many: 'Too many tries. Wait ten minutes, then ask for a new link.',
  unreadable: 'The link was cut off on its way here. Copy it whole from the mail, or ask for a new one.',
} as const;

const refuse = (why: keyof typeof sentences) =>
  Response.json(
    { why, message: sentences[why] },
    { status: why === 'too_many' ? 429 : 403, headers: { 'Cache-Control': 'no-store' } },
  );

/** The button of the sign-in page: claims the link, then lets next-auth start the session and set its cookie. */
export async function openLink(request: Request): Promise<Response> {
  if (!isSameOrigin(request.headers)) return refuse('other_browser');
  const body = presented.safeParse(await request.json().catch(() => null));
  if (!body.success) return refuse('unreadable');
  const browser = (await cookies()).get(askingBrowserCookieName())?.value ?? '';
  const result = await claimLink(body.data, browser, peerKey(request.headers), Date.now());
  if (!result.ok) return refuse(result.why);
  return startSession(request, result.claim);
}

/** @returns next-auth's own answer, its redirect turned into JSON for the page that asked */
async function startSession(request: Request, { email, token }: Claim): Promise<Response> {
  const replacedToken = (await cookies()).get(sessionCookieName())?.value ?? null;
  const adapter = authAdapter({ device: deviceWords(request.headers.get('user-agent') ?? ''), replacedToken });
  const url = new URL('/api/auth/callback/email', env().APP_URL);
  url.search = new URLSearchParams({ email, token, callbackUrl: `${env().APP_URL}/` }).toString();
  const params = Promise.resolve({ nextauth: ['callback', 'email'] });
  const answer: Response = await NextAuth(new NextRequest(url), { params }, authOptions(adapter));
  const cookie = answer.headers.getSetCookie().find((line) => line.startsWith(`${sessionCookieName()}=`));
  if (!cookie) return refuse('expired');
  return Response.json({ next: '/' }, { headers: { 'Set-Cookie': cookie, 'Cache-Control': 'no-store' } });
}
