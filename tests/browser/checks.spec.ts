import { createClient } from '@libsql/client';
import { expect, test, type Page } from '@playwright/test';
import { writePhoto } from '../support/photo-fixtures';
import { browserOf, complaintsOf, mailTo, people } from './people';
import { world } from './world';

const phone = { viewport: { width: 390, height: 844 }, hasTouch: true, isMobile: true };
const DENT = `A dent by the heel. ${Date.now()}`;
const TOLD = `We found a small dent before paint. ${Date.now()}`;

/** Reads the world beside the running app; nothing is written. */
async function ask(sql: string): Promise<Record<string, string>> {
  const db = createClient({ url: `file:${world.dataDir}/flitchbook.db` });
  const { rows, columns } = await db.execute(sql);
  db.close();
  return Object.fromEntries(columns.map((column) => [column, String(rows[0]?.[column] ?? '')]));
}

/** A build of the floor in a stage, with its owner and its rep. */
const buildIn = (stageKey: string, more = '1') =>
  ask(`select b.order_number orderNumber, owner.email owner, rep.email rep
    from builds b join build_stages s on s.build_id = b.id and s.started_at is not null and s.finished_at is null
    join build_people p on p.build_id = b.id and p.standing = 'owner' join users owner on owner.id = p.user_id
    join assignments a on a.build_id = b.id and a.ended_at is null join users rep on rep.id = a.user_id and rep.role = 'rep'
    where b.held_until_at is null and s.key = '${stageKey}' and ${more} limit 1`);

const lineOf = (page: Page, text: string) => page.locator('li').filter({ hasText: text });
const mark = (page: Page, text: string, name: 'Pass' | 'Fail' | 'Not here') =>
  lineOf(page, text).getByText(name, { exact: true }).click();

test('a list is gone through on a phone, fails, sends the build back, and the rep tells the player', async ({
  browser,
}) => {
  test.setTimeout(240_000);
  const {
    orderNumber = '',
    owner,
    rep,
  } = await buildIn('pre-paint', 'exists (select 1 from check_runs r where r.build_id = b.id and r.outcome is null)');
  const benchContext = await browserOf(browser, people.builder, phone);
  const complaints = complaintsOf(benchContext);
  const bench = await benchContext.newPage();

  await test.step('the list that was begun is found again', async () => {
    await bench.goto(`/builds/${orderNumber}/checks`);
    await expect(bench.getByText('Under way.')).toBeVisible();
    await bench.getByRole('link', { name: 'Go on with it' }).click();
    await expect(bench.getByRole('heading', { level: 1, name: 'Before paint' })).toBeVisible();
  });

  await test.step('each line is saved as it is marked, and is there after a reload', async () => {
    await mark(bench, 'Grain filled and level', 'Not here');
    await mark(bench, 'Neck pocket and cavities masked', 'Pass');
    await mark(bench, 'Wood reads 6 to 9', 'Pass');
    await mark(bench, 'Order number and finish', 'Fail');
    await expect(bench.getByText('Saved', { exact: true })).toHaveCount(7);
    await bench.reload();
    await expect(lineOf(bench, 'Order number and finish').getByRole('radio', { name: 'Fail' })).toBeChecked();
  });

  await test.step('the photo of a fail goes up and stays with its line', async () => {
    const file = test.info().outputPath('dent.jpg');
    await writePhoto(file, { widthPx: 1200, heightPx: 900, gps: true });
    const line = lineOf(bench, 'Order number and finish');
    await line.locator('input[type=file]').setInputFiles(file);
    await expect(line.locator('img')).toBeVisible({ timeout: 60_000 });
    await expect(line.getByText('Saved', { exact: true })).toBeVisible();
  });

  await test.step('a fail asks where to and why, keeps what was typed, and sends the build back', async () => {
    await bench.getByLabel('Why').fill(DENT);
    await bench.getByRole('button', { name: 'It fails: send it back' }).click();
    await expect(bench.getByText('Choose the stage it goes back to.')).toBeVisible();
    await expect(bench.getByLabel('Why')).toHaveValue(DENT);
    await bench.getByLabel('It goes back to').selectOption({ label: 'Body & joint' });
    await bench.getByRole('button', { name: 'It fails: send it back' }).click();
    await bench.waitForURL(`**/builds/${orderNumber}/checks`);
    await expect(bench.getByText(DENT)).toBeVisible();
  });
  expect(complaints).toEqual([]);

  const player = await (await browserOf(browser, owner)).newPage();
  await player.goto(`/builds/${orderNumber}`);
  await expect(player.getByText(DENT)).toHaveCount(0);
  const checks = await player.goto(`/builds/${orderNumber}/checks`);
  expect(checks?.status(), 'the shop keeps its checks to itself').toBe(404);

  const desk = await (await browserOf(browser, rep)).newPage();
  await desk.goto('/builds');
  await desk.getByRole('link', { name: orderNumber, exact: true }).first().click();
  await expect(desk.getByText(DENT)).toBeVisible();
  await desk.getByLabel('In your words').fill(TOLD);
  await desk.getByRole('button', { name: 'Tell the player' }).click();
  await expect(desk.getByText(DENT)).toHaveCount(0);
  await player.goto(`/builds/${orderNumber}`);
  await expect(player.getByText(TOLD)).toBeVisible();
});

test('the final check passes when every item is shown and the last list gone through; its owner follows it home', async ({
  browser,
}) => {
  test.setTimeout(300_000);
  const { orderNumber, owner = '', rep } = await buildIn('final-check');
  const desk = await (await browserOf(browser, rep)).newPage();
  const bench = await (await browserOf(browser, people.builder, phone)).newPage();
  const player = await (await browserOf(browser, owner)).newPage();
  const finalCheck = `/builds/${orderNumber}/final-check`;

  await test.step('it cannot pass while items are open', async () => {
    await desk.goto(finalCheck);
    await expect(desk.getByText('It cannot pass yet')).toBeVisible();
    await expect(desk.getByRole('button', { name: 'Pass the final check' })).toHaveCount(0);
  });

  await test.step('an entry is linked to what it shows', async () => {
    for (const label of ['Case', 'Strap', 'Papers in the case']) {
      await desk.goto(finalCheck);
      const form = desk.locator('form').filter({ has: desk.getByRole('button', { name: 'Link it as proof' }) });
      await form.getByLabel('Item').selectOption({ label });
      await form.getByLabel('Entry that shows it').selectOption({ index: 1 });
      await form.getByRole('button', { name: 'Link it as proof' }).click();
      await expect(form.getByText('Linked.')).toBeVisible();
    }
  });

  await test.step('the list before the case closes is gone through', async () => {
    await bench.goto(`/builds/${orderNumber}/checks`);
    await bench.getByRole('button', { name: 'Go through Before the case closes' }).click();
    await bench.waitForURL(/\/checks\/[\w-]+$/);
    const file = test.info().outputPath('case.jpg');
    await writePhoto(file, { widthPx: 1200, heightPx: 900 });
    const lines = bench.locator('li[id^=line-]');
    for (let index = 0; index < (await lines.count()); index++) {
      await lines.nth(index).getByText('Pass', { exact: true }).click();
      const input = lines.nth(index).locator('input[type=file]');
      if ((await input.count()) === 0) continue;
      await input.setInputFiles(file);
      await expect(lines.nth(index).locator('img')).toBeVisible({ timeout: 60_000 });
    }
    await expect(bench.getByText('Every line is saved.')).toBeVisible();
    await bench.getByRole('button', { name: 'It passes' }).click();
    await bench.waitForURL(`**/builds/${orderNumber}/checks`);
  });

  await test.step('it passes, and the owner is told', async () => {
    await desk.goto(finalCheck);
    await desk.getByRole('button', { name: 'Pass the final check' }).first().click();
    await desk.getByRole('dialog').getByRole('button', { name: 'Pass the final check' }).click();
    await expect(desk.getByText(/^Ready since/)).toBeVisible();
    await desk.getByLabel('Carrier').fill('Harbour Freight Lines');
    await desk.getByLabel('Number to follow it by').fill('HF 99');
    await desk.getByRole('button', { name: 'It has been shipped' }).click();
    await expect(desk.getByText(/Shipped with Harbour Freight Lines, HF 99/).first()).toBeVisible();
    await player.goto(`/builds/${orderNumber}`);
    await expect(player.getByText(/Shipped with Harbour Freight Lines, HF 99/)).toBeVisible();
    await mailTo(owner, ({ subject }) => /is ready$/.test(subject));
  });
});
