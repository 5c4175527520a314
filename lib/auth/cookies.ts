import { isHttps } from '@/lib/env';

const named = (name: string) => (isHttps() ? `__Host-flitchbook-${name}` : `flitchbook-${name}`);

/** Holds the session token. `__Host-` needs https, so only this machine's own http does without it. */
export const sessionCookieName = () => named('session');

/** Tells the browser that asked for a sign-in link from any other that opens it. */
export const askingBrowserCookieName = () => named('asking-browser');

export const cookieOptions = () => ({ httpOnly: true, sameSite: 'lax', path: '/', secure: isHttps() }) as const;
