import { createClient } from '@libsql/client';
import { expect, test, type BrowserContext } from '@playwright/test';
import { writePhoto } from '../support/photo-fixtures';
import { graveFindings } from './axe';
import { browserOf, complaintsOf, mailsTo, mailTo, people } from './people';
import { world } from './world';

/** A build of its own: its owner, its rep, and the finish department's builder, who is on every build. */
const ORDER = 'Q-2420';
const BUILDER = people.builder;
/** So that a world that has seen this test before does not answer for it. */
const STAMP = Date.now();
const SECRET = `Quincunx ${STAMP}`;
const SUBJECT = `How dark will the edge be? ${STAMP}`;
const ASKED = `As dark as on the first photo? ${STAMP}`;
const ANSWER = `A little darker than that. ${STAMP}`;
const REPLY = `Then please stop one pass earlier. ${STAMP}`;
const DAY_MS = 86_400_000;

const openDatabase = () => createClient({ url: `file:${world.dataDir}/flitchbook.db` });

/** The addresses of the build's owner and rep. */
async function readCast() {
  const db = openDatabase();
  const one = async (sql: string) => String((await db.execute({ sql, args: [ORDER] })).rows[0]?.[0] ?? '');
  const owner = await one(
    `select u.email from build_people p join builds b on b.id = p.build_id join users u on u.id = p.user_id where b.order_number = ? and p.standing = 'owner'`,
  );
  const rep = await one(
    `select u.email from assignments a join builds b on b.id = a.build_id join users u on u.id = a.user_id where b.order_number = ? and u.role = 'rep' and a.ended_at is null`,
  );
  db.close();
  return { owner, rep };
}

/** As if the answer had been due days ago. */
async function makeLate(questionId: string): Promise<void> {
  const db = openDatabase();
  await db.execute({
    sql: `update questions set due_at = ?, reminded_before_at = 1, reminded_due_at = 1, overdue_told_at = null where id = ?`,
    args: [Date.now() - 6 * DAY_MS, questionId],
  });
  db.close();
}

/** Answers the newest mail to somebody that fits, as the mail room's own page does. */
async function replyByMail(address: string, fits: string, text: string): Promise<void> {
  const mails = await (await fetch(`${world.mailUrl}/mails?to=${encodeURIComponent(address)}`)).json();
  const found = mails.find((mail: { text: string }) => mail.text.includes(fits));
  const form = new FormData();
  form.set('from', address);
  form.set('text', text);
  const answer = await fetch(`${world.mailUrl}/mail/${found.id}/reply`, { method: 'POST', body: form });
  expect(answer.ok, await answer.text()).toBe(true);
}

/** Everything that this browser can read about the question, by page and API. */
async function everythingRead(context: BrowserContext, questionId: string): Promise<string> {
  const texts: string[] = [];
  for (const path of [
    `/questions/${questionId}`,
    '/questions',
    `/builds/${ORDER}`,
    `/builds/${ORDER}/questions`,
    `/api/builds/${ORDER}/diary`,
    `/api/questions/${questionId}/letters`,
  ]) {
    const answer = await context.request.get(path);
    expect(answer.ok(), path).toBe(true);
    texts.push(await answer.text());
  }
  return texts.join('\n');
}

test('a question finds its answerer; the pen, the margin, the clock and the mail do their part', async ({
  browser,
}) => {
  test.setTimeout(300_000);
  const cast = await readCast();
  const [ownerContext, repContext] = [await browserOf(browser, cast.owner), await browserOf(browser, cast.rep)];
  const phone = { viewport: { width: 390, height: 844 }, hasTouch: true, isMobile: true };
  const builderContext = await browserOf(browser, BUILDER, phone);
  const complaints = [ownerContext, repContext, builderContext].map(complaintsOf);
  const [owner, rep, bench] = await Promise.all([ownerContext, repContext, builderContext].map((one) => one.newPage()));
  if (!owner || !rep || !bench) throw new Error('a browser without a page');

  const questionId = await test.step('the owner asks from an entry, and lets it go at once', async () => {
    await owner.goto(`/builds/${ORDER}`);
    await owner
      .getByRole('link', { name: /^Ask \S+ about this$/ })
      .first()
      .click();
    await owner.getByLabel('What is it about?').selectOption({ label: 'Finish & colour' });
    await expect(owner.getByText(/Tove Järvi, finish, answers/)).toBeVisible();
    await owner.getByLabel('Your question in a few words').fill(SUBJECT);
    await owner.getByRole('textbox', { name: 'What would you like to know?' }).fill(ASKED);
    await owner.getByRole('button', { name: 'Send question' }).click();
    await owner.waitForURL(/\/questions\/(?!phrases)[\w-]+$/);
    await owner.getByRole('button', { name: 'Send it now' }).click();
    await expect(owner.getByRole('button', { name: 'Send it now' })).toHaveCount(0);
    return new URL(owner.url()).pathname.split('/').at(-1) ?? '';
  });

  await test.step('the finish builder answers from a phone, with a photo, and corrects it before it is mailed', async () => {
    await mailTo(BUILDER, ({ text }) => text.includes(ASKED));
    const photo = test.info().outputPath('edge.jpg');
    await writePhoto(photo, { widthPx: 1200, heightPx: 900 });
    await bench.goto('/questions');
    await bench.getByRole('link', { name: SUBJECT }).click();
    await bench.getByRole('textbox', { name: /^Write to/ }).fill(`A little darkr than that. ${STAMP}`);
    await bench.locator('input[type=file][multiple]').setInputFiles(photo);
    await expect(bench.getByRole('button', { name: 'Remove photo 1' })).toBeVisible();
    await bench.getByLabel('Photo 1: what does it show?').fill('The edge in daylight');
    await expect(bench.locator('img[src^="/api/photos/"]')).toBeVisible({ timeout: 60_000 });
    await bench.getByRole('button', { name: 'Send answer' }).click();
    await bench.getByRole('button', { name: 'Correct it' }).click();
    await bench.getByRole('textbox', { name: /^Your letter/ }).fill(ANSWER);
    await bench.getByRole('button', { name: 'Save the correction' }).click();
    await expect(bench.getByText(/corrected \d\d:\d\d/)).toBeVisible();
    expect((await mailsTo(cast.owner)).filter(({ text }) => text.includes(String(STAMP)))).toEqual([]);
    await bench.getByRole('button', { name: 'Send it now' }).click();
    const mail = await mailTo(cast.owner, ({ text }) => text.includes(ANSWER));
    expect(mail.text).not.toContain('darkr');
    await owner.bringToFront();
    await owner.reload();
    await expect(owner.getByText(ANSWER)).toBeVisible();
    await expect(owner.getByRole('button', { name: /The edge in daylight/ })).toBeVisible();
  });

  await test.step('the builder sees that it was read, and by whom', async () => {
    await expect
      .poll(async () => {
        await bench.reload();
        return bench.getByText(/^Read by \S+ \d\d:\d\d$/).count();
      })
      .toBe(1);
  });

  await test.step('a reply by mail lands as a letter, and the clock runs again', async () => {
    await replyByMail(cast.owner, ANSWER, REPLY);
    await expect
      .poll(async () => {
        await owner.reload();
        return owner.getByText(REPLY).count();
      })
      .toBe(1);
    await expect(owner.getByText('by mail', { exact: false }).first()).toBeVisible();
    await expect(owner.getByText(/^answer by /)).toBeVisible();
  });

  await test.step('the rep finds it in the queue by the keyboard, writes in the margin and passes the pen', async () => {
    await rep.goto('/questions?show=all');
    const link = rep.getByRole('link', { name: SUBJECT }).locator('visible=true');
    await link.focus();
    await rep.keyboard.press('k');
    await rep.keyboard.press('j');
    await link.focus();
    await rep.keyboard.press('Enter');
    await rep.waitForURL(`**/questions/${questionId}`);
    await rep.getByLabel('Write in the margin').fill(`${SECRET}: one pass less, and no promise.`);
    await rep.getByRole('button', { name: 'Keep for the shop' }).click();
    await expect(rep.getByRole('complementary', { name: 'Shop margin' })).toContainText(SECRET);
    expect(await graveFindings(rep)).toEqual([]);
    await rep.getByRole('button', { name: 'Pass the pen' }).click();
    const dialog = rep.getByRole('dialog');
    await dialog.getByLabel('To').selectOption({ label: 'Hollis Wren, body & sanding' });
    await dialog.getByLabel('Why').fill('The edge is on your bench now.');
    await dialog.getByRole('button', { name: 'Pass it' }).click();
    await expect(rep.getByText('The edge is on your bench now.')).toBeVisible();
    await mailTo('hollis.wren@quillhaven.example', ({ text }) => text.includes(REPLY));
  });

  await test.step('the builder reads the margin below a fold on the phone', async () => {
    await bench.goto(`/questions/${questionId}`);
    await expect(bench.getByText(SECRET)).toBeHidden();
    await bench.getByRole('button', { name: /^Shop margin/ }).click();
    await expect(bench.getByText(SECRET)).toBeVisible();
    await expect(bench.getByText('Hollis Wren holds the pen and answers this.')).toBeVisible();
    expect(await graveFindings(bench)).toEqual([]);
  });

  await test.step('the margin reaches the owner by no page, API, search or mail', async () => {
    expect(await everythingRead(ownerContext, questionId)).not.toContain('Quincunx');
    await owner.goto(`/search?words=Quincunx`);
    await expect(owner.getByText('Nothing with these words')).toBeVisible();
    await owner.goto(`/search?words=darker`);
    await expect(owner.getByRole('link', { name: new RegExp(SUBJECT.slice(0, 20)) }).first()).toBeVisible();
    const refused = await ownerContext.request.post(`/api/questions/${questionId}/margin`, {
      headers: { 'sec-fetch-site': 'same-origin', origin: world.appUrl },
      data: {
        note: { type: 'doc', content: [{ type: 'paragraph', content: [{ type: 'text', text: 'x' }] }] },
        idempotencyKey: `margin-${Date.now()}`,
      },
    });
    expect(refused.status()).toBe(403);
    expect(JSON.stringify(await mailsTo(cast.owner))).not.toContain('Quincunx');
  });

  await test.step('overdue reaches the rep once', async () => {
    await makeLate(questionId);
    const overdue = async () =>
      (await mailsTo(cast.rep)).filter(({ text, subject }) => subject.includes('overdue') && text.includes(SUBJECT));
    await expect.poll(async () => (await overdue()).length, { timeout: 90_000 }).toBe(1);
    await rep.goto('/questions?show=late');
    await expect(rep.getByRole('link', { name: SUBJECT }).locator('visible=true')).toBeVisible();
    // Another turn of the clock's job, which runs once a minute.
    await new Promise((next) => setTimeout(next, 65_000));
    expect(await overdue()).toHaveLength(1);
  });

  await test.step('the owner closes it, and a letter opens it again', async () => {
    await owner.goto(`/questions/${questionId}`);
    await owner.getByRole('button', { name: 'Close it' }).click();
    await expect(owner.getByText('Closed', { exact: true })).toBeVisible();
    await owner.getByRole('textbox', { name: /^Write to/ }).fill('One more thing.');
    await owner.getByRole('button', { name: 'Send letter' }).click();
    await expect(owner.getByText('With the shop')).toBeVisible();
  });
  expect(complaints.flat()).toEqual([]);
});
