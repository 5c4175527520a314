import { createClient } from '@libsql/client';
import { expect, test, type Page } from '@playwright/test';
import { getDocument, OPS } from 'pdfjs-dist/legacy/build/pdf.mjs';
import { writePhoto } from '../support/photo-fixtures';
import { browserOf, complaintsOf, people } from './people';
import { world } from './world';

/** An order of this run alone, so that the test can be run again in the same world. */
const ORDER = `Q-9${String(Date.now()).slice(-6)}`;
const BUILD = `spec-job-${ORDER}`;
const OWNER = { address: people.otherBuyer, name: 'Jonas Okonkwo' };
const DESIGNER = 'petra.novotna@quillhaven.example';
/** What is left of the template, so that every item can be proven by hand here. */
const KEPT = ['Scale length', 'Action at the 12th fret, bass side', 'Case'];

/** An order of its own, just entered: three stages, an owner, a designer, a rep. */
async function enterOrder(): Promise<void> {
  const db = createClient({ url: `file:${world.dataDir}/flitchbook.db`, timeout: 5000 });
  const now = Date.now();
  const stages = [
    ['machining', 'Machining', 'design & machining', 'machining', now],
    ['hardware-setup', 'Hardware & set-up', 'set-up', 'setup', null],
    ['final-check', 'Final check', 'inspection', 'inspection', null],
  ] as const;
  const staff = [DESIGNER, people.rep];
  await db.batch(
    [
      { sql: `insert into routes (id, name) values (?, 'Short route')`, args: [BUILD] },
      ...stages.map(([key, name, department, work], index) => ({
        sql: `insert into route_stages (id, route_id, position, key, name, department, work, usual_days) values (?, ?, ?, ?, ?, ?, ?, 3)`,
        args: [`${BUILD}-route-${key}`, BUILD, index + 1, key, name, department, work],
      })),
      {
        sql: `insert into builds (id, order_number, instrument, finish_name, finish_hex, scale_length_in, route_id, ordered_at, created_at) values (?, ?, 'Nightjar six', 'Slate blue', '#34476c', 25.5, ?, ?, ?)`,
        args: [BUILD, ORDER, BUILD, now, now],
      },
      ...stages.map(([key, name, department, work, startedAt], index) => ({
        sql: `insert into build_stages (id, build_id, position, key, name, department, work, usual_days, started_at) values (?, ?, ?, ?, ?, ?, ?, 3, ?)`,
        args: [`${BUILD}-${key}`, BUILD, index + 1, key, name, department, work, startedAt],
      })),
      {
        sql: `insert into build_people (build_id, user_id, standing, created_at) select ?, id, 'owner', ? from users where email = ?`,
        args: [BUILD, now, OWNER.address],
      },
      ...staff.map((email) => ({
        sql: `insert into assignments (id, build_id, user_id, cleared, started_at) select ? || id, ?, id, 0, ? from users where email = ?`,
        args: [BUILD, BUILD, now, email],
      })),
    ],
    'write',
  );
  db.close();
}

const inDays = (days: number) => new Date(Date.now() + days * 86_400_000).toISOString().slice(0, 10);

async function takeOutAllBut(page: Page, kept: string[]): Promise<void> {
  const buttons = page.getByRole('button', { name: /^More about / });
  await expect(buttons.first()).toBeVisible();
  const labels = await buttons.evaluateAll((all) =>
    all.map((one) => (one.getAttribute('aria-label') ?? '').replace('More about ', '')),
  );
  expect(labels.length).toBeGreaterThan(40);
  for (const label of labels.filter((one) => !kept.includes(one))) {
    await page.getByRole('button', { name: `More about ${label}`, exact: true }).click();
    await page.getByRole('button', { name: `Take ${label} out`, exact: true }).click();
  }
}

async function saveDraft(page: Page): Promise<void> {
  await page.getByRole('button', { name: 'Save the draft' }).click();
  await expect(page.getByText(/^Saved/).first()).toBeVisible();
}

async function sendVersion(rep: Page, number: number): Promise<void> {
  await rep.goto(`/builds/${ORDER}/spec/edit`);
  await rep.getByLabel('To be signed by').fill(inDays(6));
  await rep.getByLabel('Must be signed before').selectOption({ label: 'Hardware & set-up' });
  await rep.getByRole('button', { name: `Send version ${number} to be signed` }).click();
  await expect(rep.getByRole('button', { name: `Send version ${number + 1} to be signed` })).toBeVisible();
}

async function openSignOff(owner: Page, title: RegExp): Promise<void> {
  await owner.goto(`/builds/${ORDER}`);
  await owner.getByRole('link', { name: title }).first().click();
  await owner.waitForURL('**/sign-offs/**');
}

async function sign(owner: Page): Promise<void> {
  await owner.getByLabel('Type your name').fill(OWNER.name);
  await owner.getByRole('button', { name: 'Sign', exact: true }).click();
  await expect(owner.getByRole('button', { name: 'Sign', exact: true })).toHaveCount(0);
  await expect(owner.getByText(OWNER.name).first()).toBeVisible();
}

/** Opens the bench at a stage, starts it where it lies ahead, and unfolds what belongs to it. */
async function openBench(page: Page, stage: RegExp, start: boolean): Promise<void> {
  await page.goto(`/bench/${ORDER}`);
  const choice = page.getByLabel('Stage', { exact: true });
  const option = choice.locator('option').filter({ hasText: stage });
  await expect(option).toHaveCount(1);
  await choice.selectOption((await option.getAttribute('value')) ?? '');
  if (start) await page.getByLabel('Start this stage now').check();
}

async function post(page: Page): Promise<void> {
  await page.getByRole('button', { name: /^Post/ }).click();
}

test('a spec is written, sent back, signed, measured, conceded and handed over as it was built', async ({
  browser,
}, info) => {
  test.setTimeout(300_000);
  await enterOrder();
  const contexts = {
    designer: await browserOf(browser, DESIGNER),
    rep: await browserOf(browser, people.rep),
    owner: await browserOf(browser, OWNER.address),
  };
  const complaints = Object.values(contexts).map(complaintsOf);
  const [designer, rep, owner] = await Promise.all(Object.values(contexts).map((context) => context.newPage()));
  if (!designer || !rep || !owner) throw new Error('a context without a page');

  await test.step('the designer writes a spec; what cannot be meant is said at its field', async () => {
    await designer.goto(`/builds/${ORDER}/spec`);
    await designer.getByLabel('Start from').selectOption({ label: 'Six-string, solid body' });
    await designer.getByRole('button', { name: 'Start the spec' }).click();
    await designer.waitForURL('**/spec/edit');
    await takeOutAllBut(designer, KEPT);
    await designer.getByLabel('Scale length', { exact: true }).fill('25.5 mm');
    await expect(designer.getByText(/cannot be meant|too short|is short/i).first()).toBeVisible();
    await designer.getByLabel('Scale length', { exact: true }).fill('25 1/2');
    await saveDraft(designer);
    await designer.reload();
    await expect(designer.getByLabel('Scale length', { exact: true })).toHaveValue('25 1/2');
  });

  await test.step('the rep sends it, and the owner asks for a change', async () => {
    await sendVersion(rep, 1);
    await openSignOff(owner, /sign .*version 1/i);
    await owner.getByLabel('What should be different?').fill('A padded bag instead of the hard case, please.');
    await owner.getByRole('button', { name: 'Ask for this change' }).click();
    await expect(owner.getByText('A padded bag instead of the hard case, please.').first()).toBeVisible();
  });

  await test.step('the next stage waits for the signature', async () => {
    await openBench(designer, /^Hardware/, true);
    await designer.getByRole('textbox', { name: 'Note' }).fill('On to the set-up.');
    await post(designer);
    await expect(designer.getByText(/waits for the owner to sign/).first()).toBeVisible();
  });

  await test.step('a second version is signed, and the first can no longer be', async () => {
    await designer.goto(`/builds/${ORDER}/spec/edit`);
    await designer.getByLabel('Case', { exact: true }).selectOption({ label: 'padded bag, house' });
    await saveDraft(designer);
    await sendVersion(rep, 2);
    await openSignOff(owner, /sign .*version 2/i);
    await owner.getByLabel('Type your name').fill('Somebody Else');
    await owner.getByRole('button', { name: 'Sign', exact: true }).click();
    await expect(owner.getByLabel('Type your name')).toHaveValue('Somebody Else');
    await sign(owner);
    await owner.goto(`/builds/${ORDER}/spec`);
    await expect(owner.getByRole('heading', { level: 1, name: 'As signed, as built' })).toBeVisible();
  });

  await test.step('the scale is measured at machining; the kept draft starts the stage that was blocked', async () => {
    await designer.goto(`/bench/${ORDER}`);
    await expect(designer.getByRole('textbox', { name: 'Note' })).toContainText('On to the set-up.');
    await post(designer);
    await designer.waitForURL(`**/builds/${ORDER}**`);
    await openBench(designer, /^Machining/, false);
    const photo = info.outputPath('scale.jpg');
    await writePhoto(photo, { widthPx: 900, heightPx: 700 });
    await designer.locator('input[type=file][multiple]').setInputFiles(photo);
    await expect(designer.getByText('1 of 1 uploaded')).toBeVisible({ timeout: 60_000 });
    await designer.getByLabel('Photo 1: what does it show?').fill('The rule along the board');
    await designer.getByText('Readings', { exact: true }).click();
    await designer.getByRole('textbox', { name: 'Scale length', exact: true }).fill('25.502');
    await post(designer);
    await designer.waitForURL(`**/builds/${ORDER}**`);
    await expect(designer.getByText('25.502').first()).toBeVisible();
  });

  await test.step('the action comes out too high, which is said at once and kept all the same', async () => {
    await openBench(designer, /^Hardware/, false);
    await designer.getByText('Readings', { exact: true }).click();
    await designer
      .getByRole('textbox', { name: /^Action at the 12th fret, bass/ })
      .first()
      .fill('9');
    await expect(designer.getByText(/out of tolerance/i).first()).toBeVisible();
    await post(designer);
    await designer.waitForURL(`**/builds/${ORDER}**`);
    await openBench(designer, /^Final check/, true);
    await designer.getByRole('textbox', { name: 'Note' }).fill('In its bag.');
    await designer.getByText('Shows that', { exact: true }).click();
    await designer.getByRole('checkbox', { name: 'Case', exact: true }).check();
    await post(designer);
    await designer.waitForURL(`**/builds/${ORDER}**`);
  });

  await test.step('the final check cannot pass until the owner lets the action pass', async () => {
    await rep.goto(`/builds/${ORDER}/final-check`);
    await expect(rep.getByText('It cannot pass yet')).toBeVisible();
    await rep.getByLabel('Item', { exact: true }).first().selectOption({ label: 'Action at the 12th fret, bass side' });
    await rep.getByLabel('Why it is good as it is').fill('You play slide on it, and asked for height.');
    await rep.getByLabel('Sign by').fill(inDays(4));
    await rep.getByRole('button', { name: 'Ask the owner' }).click();
    await openSignOff(owner, /sign .*Action/i);
    await expect(owner.getByText('You play slide on it, and asked for height.').first()).toBeVisible();
    await sign(owner);
    await rep.reload();
    await rep.getByRole('button', { name: 'Pass the final check' }).click();
    await rep.getByRole('dialog').getByRole('button', { name: 'Pass the final check' }).click();
    await expect(rep.getByText(/^Ready since/)).toBeVisible();
  });

  await test.step('the sheet of how it was built comes as a PDF with its words and its picture', async () => {
    await owner.goto(`/builds/${ORDER}/as-built`);
    const [download] = await Promise.all([
      owner.waitForEvent('download'),
      owner.getByRole('button', { name: 'Download as PDF' }).click(),
    ]);
    const path = info.outputPath('as-built.pdf');
    await download.saveAs(path);
    const { words, pictures } = await readPdf(path);
    for (const said of [ORDER, 'Scale length', '25.502', 'padded bag, house', OWNER.name, 'You play slide on it'])
      expect(words, said).toContain(said);
    expect(pictures).toBeGreaterThan(0);
  });
  expect(complaints.flat().filter((line) => !/status of 4\d\d/.test(line))).toEqual([]);
});

async function readPdf(path: string): Promise<{ words: string; pictures: number }> {
  const pdf = await getDocument({ url: path, verbosity: 0 }).promise;
  const words: string[] = [];
  let pictures = 0;
  for (let number = 1; number <= pdf.numPages; number++) {
    const page = await pdf.getPage(number);
    const { items } = await page.getTextContent();
    words.push(...items.map((item) => ('str' in item ? item.str : '')));
    const { fnArray } = await page.getOperatorList();
    pictures += fnArray.filter((call) => call === OPS.paintImageXObject).length;
  }
  return { words: words.join(' ').replace(/\s+/g, ' '), pictures };
}
