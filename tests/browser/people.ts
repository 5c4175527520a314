import type { Browser, BrowserContext, Page } from '@playwright/test';
import { tokenFor } from './tokens';
import { world } from './world';

/** Addresses of the demo world that the browser tests sign in as. */
export const people = {
  buyer: 'maren.oyelaran@clients.example',
  otherBuyer: 'jonas.okonkwo@clients.example',
  artist: 'kasimir.roe@clients.example',
  companion: 'felix.oyelaran@clients.example',
  builder: 'tove.jarvi@quillhaven.example',
  unassignedBuilder: 'mateus.falcao@quillhaven.example',
  rep: 'lucia.tamberlan@quillhaven.example',
  otherRep: 'oskar.penhallow@quillhaven.example',
  hostileBuyer: 'dara.farrow@clients.example',
  admin: 'nadia.brandvold@quillhaven.example',
} as const;

/** A browser of its own, signed in as this person; without an address, a stranger's. */
export async function browserOf(
  browser: Browser,
  address?: string,
  options: Parameters<Browser['newContext']>[0] = {},
) {
  const context = await browser.newContext(options);
  if (address)
    await context.addCookies([
      { name: 'flitchbook-session', value: tokenFor(address), url: world.appUrl, httpOnly: true, sameSite: 'Lax' },
    ]);
  return context;
}

export type Mail = {
  to: string[];
  subject: string;
  text: string;
  html: string;
  headers: Record<string, string>;
  createdAt: string;
  attachments: { contentType: string; contentId?: string; sizeBytes: number }[];
};

export async function mailsTo(address: string): Promise<Mail[]> {
  const answer = await fetch(`${world.mailUrl}/mails?to=${encodeURIComponent(address)}`);
  const mails: Mail[] = await answer.json();
  return mails;
}

/** Waits for the newest mail to somebody that fits. */
export async function mailTo(address: string, fits: (mail: Mail) => boolean): Promise<Mail> {
  for (let tries = 0; tries < 120; tries++) {
    const found = (await mailsTo(address)).find(fits);
    if (found) return found;
    await new Promise((next) => setTimeout(next, 250));
  }
  throw new Error(`no such mail to ${address}`);
}

/** Signs in as a person does: asks, reads the mail, opens the link, presses the button. */
export async function signInByMail(page: Page, address: string): Promise<void> {
  const askedAt = Date.now();
  await page.goto('/sign-in');
  await page.getByLabel('Your mail address').fill(address);
  await page.getByRole('button', { name: 'Mail me a link' }).click();
  await page.waitForURL('**/sign-in/sent');
  const mail = await mailTo(
    address,
    ({ text, createdAt }) => text.includes('/sign-in/open#') && Date.parse(createdAt) >= askedAt - 1000,
  );
  await page.goto(/http\S+\/sign-in\/open#\S+/.exec(mail.text)?.[0] ?? '');
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
  await page.waitForURL((url) => !url.pathname.startsWith('/sign-in'));
}

/** Everything the browser complains about; a test ends with none of it. */
export function complaintsOf(context: BrowserContext): string[] {
  const complaints: string[] = [];
  context.on('weberror', (error) => complaints.push(error.error().message));
  context.on('console', (message) => {
    if (message.type() === 'error') complaints.push(`${message.text()} at ${message.location().url}`);
  });
  return complaints;
}
