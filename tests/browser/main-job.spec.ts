import { expect, test, type Page } from '@playwright/test';
import exifr from 'exifr';
import sharp from 'sharp';
import { writePhoto } from '../support/photo-fixtures';
import { browserOf, complaintsOf, mailsTo, mailTo, people, signInByMail } from './people';
import { world } from './world';

const ORDER = 'Q-2417';
const NOTE = `The second coat is on, and it holds. ${Date.now()}`;

/** The ids of the photos under an entry, as the page's picture addresses have them. */
async function photoIdsOf(page: Page, text: string): Promise<string[]> {
  const entry = page
    .getByRole('listitem')
    .filter({ hasText: text })
    .filter({ has: page.locator('article') });
  const sources = await entry
    .locator('img[srcset]')
    .evaluateAll((images) => images.map((image) => image.getAttribute('src') ?? ''));
  return sources.map((source) => /\/api\/photos\/([\w-]+)\//.exec(source)?.[1] ?? '');
}

test('a builder posts from the bench, the player sees it, asks, is answered and gets mail; rights end at once', async ({
  browser,
}) => {
  test.setTimeout(240_000);
  const upright = test.info().outputPath('first.jpg');
  const lying = test.info().outputPath('second.jpg');
  await writePhoto(upright, { widthPx: 1200, heightPx: 900, orientation: 6, gps: true });
  await writePhoto(lying, { widthPx: 1600, heightPx: 1200, orientation: 3, gps: true });
  expect(await exifr.gps(upright), 'the photograph that is sent carries its place').toBeTruthy();

  const playerContext = await browserOf(browser, people.buyer);
  const complaints = complaintsOf(playerContext);
  const player = await playerContext.newPage();
  await player.goto(`/builds/${ORDER}`);
  await expect(player.getByRole('heading', { level: 1, name: 'Nightjar baritone' })).toBeVisible();
  await player.goto('/me');
  const diaryMail = player.locator('form').filter({ has: player.locator('input[name=cadence]') });
  await diaryMail.getByRole('radio', { name: /^At once/ }).check();
  await diaryMail.getByRole('button', { name: /^Save/ }).click();
  await expect(player.getByText('A mail at once')).toBeVisible();
  await player.goto(`/builds/${ORDER}`);

  const bench = await (
    await browser.newContext({ viewport: { width: 390, height: 844 }, hasTouch: true, isMobile: true })
  ).newPage();
  await test.step('the builder signs in by mail and posts two photographs with a note', async () => {
    await signInByMail(bench, people.builder);
    await bench.goto(`/bench/${ORDER}`);
    await bench.locator('input[type=file][multiple]').setInputFiles([upright, lying]);
    await expect(bench.getByText('2 of 2 uploaded')).toBeVisible({ timeout: 60_000 });
    await bench.getByLabel('Photo 1: what does it show?').fill('The body hanging in the finish room');
    await bench.getByRole('textbox', { name: 'Note' }).fill(NOTE);
    await bench.getByRole('button', { name: 'Post to the diary' }).click();
    await bench.waitForURL(`**/builds/${ORDER}**`);
  });

  await test.step('the page that the player has open shows it within 15 seconds, without a reload', async () => {
    await expect(player.getByText(NOTE)).toBeVisible({ timeout: 15_000 });
    await expect.poll(() => photoIdsOf(player, NOTE)).toHaveLength(2);
  });
  const [photoId = ''] = await photoIdsOf(player, NOTE);

  await test.step('the served photograph stands upright and tells nothing but the picture', async () => {
    const answer = await playerContext.request.get(`/api/photos/${photoId}/2048`);
    expect(answer.url(), 'it comes from the store, by a link').toContain(world.storeUrl);
    expect(Number(new URL(answer.url()).searchParams.get('X-Amz-Expires'))).toBeLessThanOrEqual(300);
    const picture = await sharp(await answer.body()).metadata();
    expect([picture.width, picture.height], 'orientation 6 swaps the sides').toEqual([900, 1200]);
    expect([picture.exif, picture.xmp, picture.iptc, picture.icc, picture.orientation]).toEqual(
      Array(5).fill(undefined),
    );
  });

  await test.step('a stranger and another buyer get 404 for page, API and photo', async () => {
    const stranger = await browserOf(browser, people.otherBuyer);
    for (const path of [
      `/builds/${ORDER}`,
      `/api/builds/${ORDER}/diary`,
      `/api/photos/${photoId}/640`,
      '/builds/Q-0000',
      '/api/photos/nothing/640',
    ]) {
      const answer = await stranger.request.get(path);
      expect(answer.status(), path).toBe(404);
      expect(await answer.text(), path).not.toContain('Nightjar');
    }
    await stranger.close();
  });

  const question = `How many more coats? ${Date.now()}`;
  await test.step('the player asks from the entry, and the holder of the pen answers', async () => {
    await player
      .getByRole('listitem')
      .filter({ hasText: NOTE })
      .getByRole('link', { name: /^Ask Tove/ })
      .click();
    await player.getByLabel('What is it about?').selectOption({ label: 'Finish & colour' });
    await player.getByLabel('Your question in a few words').fill(question);
    await player.getByRole('textbox', { name: 'What would you like to know?' }).fill('I am counting the days.');
    await player.getByRole('button', { name: /^Send/ }).click();
    await player.waitForURL(/\/questions\/[\w-]+$/);
    await player.getByRole('button', { name: 'Send it now' }).click();
    const asked = await mailTo(people.builder, ({ text }) => text.includes('I am counting the days.'));
    await bench.goto(/http\S+\/questions\/[\w-]+/.exec(asked.text)?.[0] ?? '');
    await bench.locator('[contenteditable=true]').fill('Two more, a day apart.');
    await bench.getByRole('button', { name: /^Send/ }).click();
    await expect(bench.getByText('Two more, a day apart.').first()).toBeVisible();
    await bench.getByRole('button', { name: 'Send it now' }).click();
    await mailTo(people.buyer, ({ text }) => text.includes('Two more, a day apart.'));
    await expect(player.getByText('Two more, a day apart.')).toBeVisible({ timeout: 30_000 });
  });

  await test.step('the digest has come once, with its photograph inside and one-click unsubscribe that works', async () => {
    const digest = await mailTo(people.buyer, ({ text }) => text.includes(NOTE));
    expect((await mailsTo(people.buyer)).filter(({ text }) => text.includes(NOTE))).toHaveLength(1);
    expect(digest.attachments.length).toBeGreaterThan(0);
    for (const { sizeBytes } of digest.attachments) expect(sizeBytes).toBeLessThanOrEqual(60_000);
    expect(digest.headers['List-Unsubscribe-Post']).toBe('List-Unsubscribe=One-Click');
    const link = /<(.+)>/.exec(digest.headers['List-Unsubscribe'] ?? '')?.[1] ?? '';
    const left = await fetch(link, { method: 'POST', body: 'List-Unsubscribe=One-Click', redirect: 'manual' });
    expect([200, 202]).toContain(left.status);
    await player.goto('/me');
    await expect(player.getByText('No diary mail. You read it here.')).toBeVisible();
  });

  await test.step('the admin ends the assignment, and the builder’s next request is refused', async () => {
    expect((await bench.request.get(`/api/builds/${ORDER}/diary`)).status()).toBe(200);
    const admin = await (await browserOf(browser, people.admin)).newPage();
    await admin.goto(`/access/builds/${ORDER}`);
    await admin
      .getByRole('button', { name: /Take off.*Tove Järvi/ })
      .first()
      .click();
    await admin
      .getByRole('dialog')
      .getByRole('button', { name: /^Take off/ })
      .click();
    await expect(admin.getByRole('button', { name: /Take off.*Tove Järvi/ })).toHaveCount(0);
    for (const path of [
      `/api/builds/${ORDER}/diary`,
      `/builds/${ORDER}`,
      `/bench/${ORDER}`,
      `/api/photos/${photoId}/640`,
    ]) {
      expect((await bench.request.get(path)).status(), path).toBe(404);
    }
  });
  expect(complaints).toEqual([]);
});
