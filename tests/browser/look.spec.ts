import { expect, test, type Page } from '@playwright/test';
import { graveFindings } from './axe';
import { browserOf, complaintsOf, people } from './people';

test.describe.configure({ mode: 'parallel' });

const ORDER = 'Q-2417';
const build = `/builds/${ORDER}`;

/** Every page, as somebody who works with it sees it. */
const pages: [keyof typeof people | 'nobody', string[]][] = [
  ['nobody', ['/sign-in', '/sign-in/sent', '/sign-in/open', '/unsubscribe/some-token']],
  ['buyer', [build, '/builds', `${build}/people`, `${build}/questions`, `${build}/questions/new`, '/questions', '/me']],
  ['buyer', [`${build}/window`, `${build}/spec`, `${build}/spec/versions`, `${build}/spec/frets`]],
  ['buyer', [`${build}/spec/changes`, `${build}/sign-offs`, `${build}/readings`, `${build}/as-built`]],
  ['buyer', ['/sign-offs', '/me/digest-preview']],
  ['companion', [build, `${build}/people`]],
  ['builder', ['/bench', `/bench/${ORDER}`, '/builds', '/questions', '/me', build]],
  ['builder', ['/floor', '/floor/load', '/floor/windows', '/floor/racks/rack%209']],
  ['rep', ['/builds', '/questions', build, `${build}/people`]],
  ['rep', ['/questions?show=late', '/questions/phrases', '/search', '/search?words=edge']],
  ['rep', [`${build}/spec/edit`, `${build}/checks`, `${build}/final-check`, `${build}/sign-offs/new`]],
  ['admin', ['/access/topics', '/access/checks']],
  ['admin', ['/access/calendar', '/access/stages', '/floor']],
  [
    'admin',
    ['/access', '/access/builds', `/access/builds/${ORDER}`, '/access/mail', '/access/record?check=1', '/builds'],
  ],
];

const desk = { width: 1360, height: 900 };
const phone = { width: 390, height: 844 };

const widthLeftOver = (page: Page) =>
  page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);

/** One visit, looked at on a desk in light and on a phone in dark. */
async function lookAt(page: Page, path: string) {
  await page.setViewportSize(desk);
  await page.emulateMedia({ colorScheme: 'light' });
  await page.goto(path);
  await expect(page.locator('h1'), `${path} has one heading of the first level`).toHaveCount(1);
  for (const [viewport, colorScheme] of [
    [desk, 'light'],
    [phone, 'dark'],
  ] as const) {
    await page.setViewportSize(viewport);
    await page.emulateMedia({ colorScheme });
    expect(await widthLeftOver(page), `${path} scrolls sideways at ${viewport.width} px`).toBeLessThanOrEqual(0);
    expect(await graveFindings(page), `axe on ${path} at ${viewport.width} px, ${colorScheme}`).toEqual([]);
  }
}

for (const [who, paths] of pages) {
  test(`${who}, from ${paths[0]} on: no page complains, scrolls sideways or fails axe, on a desk in light and a phone in dark`, async ({
    browser,
  }) => {
    test.setTimeout(180_000);
    const context = await browserOf(browser, who === 'nobody' ? undefined : people[who]);
    const complaints = complaintsOf(context);
    const page = await context.newPage();
    for (const path of paths) await lookAt(page, path);
    expect(complaints).toEqual([]);
    await context.close();
  });
}

test('a diary is read and its photographs looked through with the keyboard alone', async ({ browser }) => {
  const context = await browserOf(browser, people.buyer);
  const page = await context.newPage();
  await page.goto(build);
  await page.keyboard.press('Tab');
  await expect(page.getByRole('link', { name: 'Go to the page' })).toBeFocused();
  const first = page.getByRole('button', { name: /Open large, 1 of 3/ }).first();
  await first.focus();
  await page.keyboard.press('Enter');
  const large = page.getByRole('dialog', { name: 'Photo, large' });
  await expect(large.getByText('1 of 3')).toBeVisible();
  await page.keyboard.press('ArrowRight');
  await expect(large.getByText('2 of 3')).toBeVisible();
  await page.keyboard.press('Escape');
  await expect(large).toBeHidden();
  await expect(first).toBeFocused();
  await context.close();
});

test('photographs keep their place while they load: the page does not jump', async ({ browser }) => {
  const context = await browserOf(browser, people.buyer);
  const page = await context.newPage();
  await page.addInitScript(() => {
    Object.assign(window, { shifted: 0 });
    new PerformanceObserver((list) => {
      for (const entry of list.getEntries())
        if ('value' in entry)
          Object.assign(window, { shifted: Number(Reflect.get(window, 'shifted')) + Number(entry.value) });
    }).observe({ type: 'layout-shift', buffered: true });
  });
  await page.goto(build);
  await page.waitForLoadState('networkidle');
  expect(Number(await page.evaluate(() => Reflect.get(window, 'shifted')))).toBeLessThan(0.02);
  await context.close();
});
