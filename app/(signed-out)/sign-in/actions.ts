'use server';

import { cookies, headers } from 'next/headers';
import { redirect } from 'next/navigation';
import { after } from 'next/server';
import { z } from 'zod';
import { askForLink } from '@/db/queries/sign-in';
import { openAction } from '@/lib/action';
import { askingBrowserCookieName, cookieOptions } from '@/lib/auth/cookies';
import { peerKey } from '@/lib/auth/peer';
import { newCode, newToken } from '@/lib/auth/secrets';
import { SIGN_IN_LINK_MS } from '@/lib/auth/session-limits';
import { wakeMail } from '@/lib/jobs/run';
import { normaliseAddress } from '@/lib/validation/address';

/** Known or unknown, the answer takes this long: longer than the work ever does. */
const ANSWER_MS = 400;

const address = z.object({ address: z.string().min(1, 'Write the address your invitation came to.').max(1000) });

/** Mails a sign-in link to an invited address; to everybody else it looks the same. */
export const ask = openAction(address, async ({ address: typed }) => {
  const browser = newToken();
  const peer = peerKey(await headers());
  const link = {
    address: normaliseAddress(typed),
    peer,
    browser,
    token: newToken(),
    code: newCode(),
    nowMs: Date.now(),
  };
  await Promise.all([askForLink(link), new Promise((answer) => setTimeout(answer, ANSWER_MS))]);
  // Only when the answer is out: writing the mail would make a known address answer later.
  after(wakeMail);
  (await cookies()).set(askingBrowserCookieName(), browser, { ...cookieOptions(), maxAge: SIGN_IN_LINK_MS / 1000 });
  redirect('/sign-in/sent');
});
