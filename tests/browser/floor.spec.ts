import { expect, test, type BrowserContext, type Page } from '@playwright/test';
import { openApp, type App } from '../bench/app';
import { staffToken } from '../bench/fill';
import { fillFloor, ON_FLOOR } from '../bench/fill-floor';
import { graveFindings } from './axe';
import { complaintsOf } from './people';

/** Five hundred builds in a world of their own, behind an app of their own. */
let app: App;

test.beforeAll(async () => {
  test.setTimeout(180_000);
  app = await openApp(ON_FLOOR, false, fillFloor);
});
test.afterAll(() => app.stop());

const rows = (page: Page) => page.getByRole('row');

async function openFloor(context: BrowserContext, query = ''): Promise<Page> {
  await context.addCookies([{ name: 'flitchbook-session', value: staffToken(0), url: app.url }]);
  const page = await context.newPage();
  await page.goto(`${app.url}/floor${query}`);
  return page;
}

// The rows of the first screens stand for all: axe would look at fifteen thousand elements.
const rowsBelow = { exclude: '[role=row]:nth-child(n + 12)' };

for (const [device, viewport] of [
  ['a desk', { width: 1360, height: 900 }],
  ['a phone', { width: 390, height: 844 }],
] as const) {
  test(`on ${device} all five hundred builds are there, fit the page and pass axe in both themes`, async ({
    browser,
  }) => {
    test.setTimeout(180_000);
    const context = await browser.newContext({ viewport });
    const complaints = complaintsOf(context);
    const page = await openFloor(context);
    await expect(page.getByRole('heading', { level: 1 })).toContainText(`${ON_FLOOR} builds on the floor`);
    await expect(rows(page)).toHaveCount(ON_FLOOR + 1, { timeout: 60_000 });
    expect(await page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth)).toBe(
      0,
    );
    expect(await graveFindings(page, rowsBelow)).toEqual([]);
    await page.emulateMedia({ colorScheme: 'dark' });
    expect(await graveFindings(page, rowsBelow)).toEqual([]);
    expect(complaints).toEqual([]);
    await context.close();
  });

  test(`on ${device} what is chosen stays in the address, and a build is moved and taken back by the keyboard`, async ({
    browser,
  }) => {
    test.setTimeout(180_000);
    const context = await browser.newContext({ viewport });
    const page = await openFloor(context);
    await expect(rows(page)).toHaveCount(ON_FLOOR + 1, { timeout: 60_000 });
    await page.getByRole('checkbox', { name: 'Quiet' }).check();
    await expect(page).toHaveURL(/quiet=1/);
    const quiet = await page.getByRole('table').getAttribute('aria-rowcount');
    expect(Number(quiet)).toBeLessThan(ON_FLOOR);
    await page.reload();
    await expect(page.getByRole('checkbox', { name: 'Quiet' })).toBeChecked();
    await expect(page.getByRole('table')).toHaveAttribute('aria-rowcount', quiet ?? '');
    await page.goto(`${app.url}/floor?find=Q-10000`);
    const row = rows(page).filter({ hasText: 'Q-10000' });
    await expect(row.getByRole('img')).toHaveAccessibleName(/Stage 2 of 8, Stage 1/);
    await expect(page.getByRole('table')).toHaveAttribute('aria-rowcount', '2');
    const move = page.getByRole('button', { name: 'Move Q-10000' });
    await move.focus();
    await page.keyboard.press('Enter');
    await page.getByRole('button', { name: 'Start Stage 2' }).focus();
    await page.keyboard.press('Enter');
    await expect(page.getByRole('status').filter({ hasText: 'Q-10000 is in Stage 2 now.' })).toBeVisible();
    await page.getByRole('button', { name: /^Undo/ }).press('Enter');
    await expect(row.getByRole('img')).toHaveAccessibleName(/Stage 2 of 8, Stage 1/);
    await context.close();
  });
}

test('a build whose owner has asked something says who owes the answer', async ({ browser }) => {
  const context = await browser.newContext({ viewport: { width: 390, height: 844 } });
  const page = await openFloor(context, '?find=Q-10007');
  const row = rows(page).filter({ hasText: 'Q-10007' });
  await expect(row).toContainText('waits on Bench hand 8');
  await page.getByRole('button', { name: 'Move Q-10007' }).click();
  await expect(page.getByRole('dialog')).toContainText('Owner 7 waits for Bench hand 8’s answer on “Which fret wire?”');
  await context.close();
});

test('a whole rack moves at once, and its list is there to print', async ({ browser }) => {
  const context = await browser.newContext({ viewport: { width: 1360, height: 900 } });
  const page = await openFloor(context, '?rack=rack+7');
  const inTheList = Number(await page.getByRole('table').getAttribute('aria-rowcount')) - 1;
  await page
    .getByRole('button', { name: /^Move Q-/ })
    .first()
    .click();
  await page.getByRole('button', { name: `Move all of rack 7 on: ${inTheList} builds` }).click();
  await expect(page.getByRole('status').filter({ hasText: /builds are moved|is in/ })).toBeVisible();
  await page.getByRole('button', { name: /^Undo/ }).click();
  await page.getByRole('link', { name: 'Print the list of rack 7' }).click();
  await expect(page.getByRole('heading', { level: 1, name: 'rack 7' })).toBeVisible();
  await expect(page.getByRole('row')).toHaveCount(inTheList + 1);
  await page.emulateMedia({ media: 'print' });
  await expect(page.getByRole('button', { name: 'Print' })).toBeHidden();
  await context.close();
});
