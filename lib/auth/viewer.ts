import 'server-only';
import { cache } from 'react';
import { cookies } from 'next/headers';
import { sessionCookieName } from './cookies';
import { findSessionViewer, type SessionViewer } from '@/db/queries/sessions';

/** The signed-in person of this request, or null. Read from the database once a request, never from the cookie alone. */
export const findViewer = cache(async (): Promise<SessionViewer | null> => {
  const token = (await cookies()).get(sessionCookieName())?.value;
  return token ? findSessionViewer(token, Date.now()) : null;
});
