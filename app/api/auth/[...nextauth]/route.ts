import { openLink } from '@/lib/auth/open-link';
import { leave } from '@/lib/auth/leave';

/**
 * next-auth's own doors are closed: its GET signs in, and its POST does so without any check. What stays open is our
 * step in front of its callback, and signing out.
 */
export async function POST(request: Request, { params }: { params: Promise<{ nextauth: string[] }> }) {
  const door = (await params).nextauth.join('/');
  if (door === 'callback/email') return openLink(request);
  if (door === 'signout') return leave(request);
  return new Response(null, { status: 404 });
}
