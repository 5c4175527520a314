import 'server-only';
import { cookieOptions, sessionCookieName } from './cookies';
import { isSameOrigin } from './origin';
import { findViewer } from './viewer';
import { endSession } from '@/db/queries/sessions';
import { env } from '@/lib/env';

/** Ends this browser's session and makes it forget what it kept: caches, drafts and cookie. */
export async function leave(request: Request): Promise<Response> {
  if (!isSameOrigin(request.headers)) return new Response(null, { status: 403 });
  const viewer = await findViewer();
  if (viewer) await endSession(viewer, Date.now());
  const { path, sameSite, secure } = cookieOptions();
  const gone = `${sessionCookieName()}=; Path=${path}; Max-Age=0; HttpOnly; SameSite=${sameSite}${secure ? '; Secure' : ''}`;
  return new Response(null, {
    status: 303,
    headers: {
      Location: `${env().APP_URL}/sign-in`,
      'Set-Cookie': gone,
      'Clear-Site-Data': '"cache", "storage"',
      'Cache-Control': 'no-store',
    },
  });
}
