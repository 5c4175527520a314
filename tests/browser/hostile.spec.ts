import { expect, test } from '@playwright/test';
import { browserOf, people } from './people';
import { HOSTILE_ORDER } from './tokens';

test('hostile documents in the database run nothing, fetch nothing and harm only themselves', async ({ browser }) => {
  test.setTimeout(180_000);
  const context = await browserOf(browser, people.hostileBuyer);
  const foreign: string[] = [];
  const dialogs: string[] = [];
  const page = await context.newPage();
  page.on('request', (request) => {
    if (!/^(http:\/\/127\.0\.0\.1:|data:|blob:)/.test(request.url())) foreign.push(request.url());
  });
  page.on('dialog', (dialog) => {
    dialogs.push(dialog.message());
    void dialog.dismiss();
  });
  await page.goto(`/builds/${HOSTILE_ORDER}`);
  const older = page.getByRole('button', { name: 'Show older pages' });
  for (let turns = 0; turns < 40 && (await older.count()) > 0; turns++) {
    const before = await page.locator('article').count();
    await older.click();
    await expect.poll(() => page.locator('article').count()).toBeGreaterThan(before);
  }
  await expect(page.getByText('A harmless page after all of them.')).toBeVisible();
  await expect(page.getByText('A harmless page before all of them.')).toBeVisible();
  expect(await page.locator('article').count()).toBeGreaterThan(150);
  expect(
    await page
      .locator('article script, article iframe, article svg, article [onclick], article [onerror], article [style]')
      .count(),
  ).toBe(0);
  const schemes = await page
    .locator('article a')
    .evaluateAll((links) => links.map((link) => new URL(link.getAttribute('href') ?? '', location.href).protocol));
  for (const scheme of schemes) expect(['http:', 'https:', 'mailto:']).toContain(scheme);
  expect(foreign).toEqual([]);
  expect(dialogs).toEqual([]);
  await context.close();
});
