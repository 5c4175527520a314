import type { NextAuthOptions } from 'next-auth';
import type { Adapter } from 'next-auth/adapters';
import type { EmailConfig } from 'next-auth/providers/email';
import { cookieOptions, sessionCookieName } from './cookies';
import { newToken } from './secrets';
import { env, isHttps } from '@/lib/env';

/** Written by hand: importing the stock provider would load a mailer that this product does not use. */
const mailedLink: EmailConfig = {
  id: 'email',
  type: 'email',
  name: 'Email',
  server: '',
  from: '',
  maxAge: 600,
  options: {},
  sendVerificationRequest: () => Promise.reject(new Error('links are mailed from the outbox')),
};

/** next-auth's part of signing in: consuming a claimed link, starting the database session, setting its cookie. */
export function authOptions(adapter: Adapter): NextAuthOptions {
  process.env.NEXTAUTH_URL = env().APP_URL;
  return {
    adapter,
    providers: [mailedLink],
    secret: env().AUTH_SECRET,
    useSecureCookies: isHttps(),
    session: { strategy: 'database', maxAge: 30 * 86_400, generateSessionToken: newToken },
    cookies: { sessionToken: { name: sessionCookieName(), options: cookieOptions() } },
    pages: { signIn: '/sign-in', error: '/sign-in/open' },
  };
}
