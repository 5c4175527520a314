import AxeBuilder from '@axe-core/playwright';
import { expect, test, type Page } from '@playwright/test';
import { browserOf, complaintsOf, people } from './people';

const ORDER = 'Q-2417';
const build = `/builds/${ORDER}`;

/** Every page, as somebody who works with it sees it. */
const pages: [keyof typeof people | 'nobody', string[]][] = [
  ['nobody', ['/sign-in', '/sign-in/sent', '/sign-in/open', '/unsubscribe/some-token']],
  ['buyer', [build, '/builds', `${build}/people`, `${build}/questions`, `${build}/questions/new`, '/questions', '/me']],
  ['companion', [build, `${build}/people`]],
  ['builder', ['/bench', `/bench/${ORDER}`, '/builds', '/questions', '/me', build]],
  ['rep', ['/builds', '/questions', build, `${build}/people`]],
  [
    'admin',
    ['/access', '/access/builds', `/access/builds/${ORDER}`, '/access/mail', '/access/record?check=1', '/builds'],
  ],
];

const sizes = [
  { name: 'phone', viewport: { width: 390, height: 844 }, colorScheme: 'light' },
  { name: 'desk', viewport: { width: 1360, height: 900 }, colorScheme: 'light' },
  { name: 'desk, dark', viewport: { width: 1360, height: 900 }, colorScheme: 'dark' },
  { name: 'phone, dark', viewport: { width: 390, height: 844 }, colorScheme: 'dark' },
] as const;

const widthLeftOver = (page: Page) =>
  page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);

for (const { name, ...look } of sizes) {
  for (const [who, paths] of pages) {
    test(`${who} on a ${name}: no page complains, scrolls sideways or fails axe`, async ({ browser }) => {
      test.setTimeout(180_000);
      const context = await browserOf(browser, who === 'nobody' ? undefined : people[who], look);
      const complaints = complaintsOf(context);
      const page = await context.newPage();
      for (const path of paths) {
        await page.goto(path);
        await page.waitForLoadState('networkidle');
        expect(await widthLeftOver(page), `${path} scrolls sideways`).toBeLessThanOrEqual(0);
        await expect(page.locator('h1'), `${path} has one heading of the first level`).toHaveCount(1);
        const { violations } = await new AxeBuilder({ page }).analyze();
        const grave = violations.filter(({ impact }) => impact === 'serious' || impact === 'critical');
        const words = grave.map(({ id, nodes }) => `${id}: ${nodes.map((node) => node.target.join(' ')).join(', ')}`);
        expect(words, `axe on ${path}`).toEqual([]);
      }
      expect(complaints).toEqual([]);
      await context.close();
    });
  }
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
