import { createClient } from '@libsql/client';
import { expect, test, type BrowserContext } from '@playwright/test';
import { drawDrawing } from '@/db/demo/drawings';
import { plainNote } from '@/lib/rich-text/plain-text';
import { browserOf, complaintsOf, mailTo, people } from './people';
import { world } from './world';

/** Its owner has sent the first drawing of the headstock back, and the next stage waits. */
const ORDER = 'Q-2429';
const OWNER = 'wanda.grabowska@clients.example';
const TITLE = 'Headstock logo, drawing 2';

async function nextStageId(): Promise<string> {
  const db = createClient({ url: `file:${world.dataDir}/flitchbook.db` });
  const { rows } = await db.execute({
    sql: `select s.id from build_stages s join builds b on b.id = s.build_id where b.order_number = ? and s.started_at is null order by s.position limit 1`,
    args: [ORDER],
  });
  db.close();
  return String(rows[0]?.[0] ?? '');
}

/** What the bench is told when somebody starts the stage. */
async function startStage(bench: BrowserContext, stageId: string) {
  const answer = await bench.request.post('/api/entries', {
    headers: { 'sec-fetch-site': 'same-origin', origin: world.appUrl },
    data: {
      orderNumber: ORDER,
      idempotencyKey: `sign-offs-${Date.now()}`,
      stageId,
      startStage: true,
      audience: 'shop',
      note: plainNote('On to the next one.'),
      photos: [],
    },
  });
  return { status: answer.status(), text: await answer.text() };
}

test('a drawing is sent back, sent again and signed; the stage it blocks waits, and then starts', async ({
  browser,
}) => {
  test.setTimeout(180_000);
  const stageId = await nextStageId();
  const bench = await browserOf(browser, people.builder);
  const repContext = await browserOf(browser, people.rep);
  const ownerContext = await browserOf(browser, OWNER, { viewport: { width: 390, height: 844 } });
  const complaints = [complaintsOf(repContext), complaintsOf(ownerContext)];
  const [rep, owner] = [await repContext.newPage(), await ownerContext.newPage()];

  await test.step('the stage cannot be started, with a sentence that says why', async () => {
    const blocked = await startStage(bench, stageId);
    expect(blocked.status).toBe(422);
    expect(blocked.text).toContain('waits for the owner to sign “Headstock logo, drawing 1”');
  });

  await test.step('the rep finds what the owner wants, and sends another in its place', async () => {
    await rep.goto('/sign-offs');
    const row = rep.getByRole('row').filter({ hasText: ORDER }).filter({ hasText: 'Headstock logo, drawing 1' });
    await row.getByRole('link').click();
    await rep.getByRole('link', { name: 'Send another in its place' }).click();
    await expect(rep.getByText('Could the brass be brushed')).toBeVisible();
    await rep.getByLabel('Its name').fill(TITLE);
    await rep.getByLabel('Sign by').fill(new Date(Date.now() + 5 * 86_400_000).toISOString().slice(0, 10));
    const file = { name: 'logo.pdf', mimeType: 'application/pdf' };
    const chooser = rep.getByLabel('What is signed');
    await chooser.setInputFiles({ ...file, buffer: Buffer.from('<!doctype html><script>alert(1)</script>') });
    await expect(rep.getByText('This is neither a PDF nor a photo')).toBeVisible();
    await rep.getByRole('button', { name: 'Send it to be signed' }).click();
    await expect(rep.getByText('Choose a PDF or a photo to be signed')).toBeVisible();
    await expect(rep.getByLabel('Its name')).toHaveValue(TITLE);
    const notes = { orderNumber: ORDER, title: TITLE, instrument: 'Nightjar baritone' };
    await chooser.setInputFiles({ ...file, buffer: drawDrawing('headstock', 2, notes) });
    await expect(rep.getByText('is ready to be sent')).toBeVisible();
    await rep.getByRole('button', { name: 'Send it to be signed' }).click();
    await expect(rep.getByRole('heading', { level: 1, name: TITLE })).toBeVisible();
  });

  await test.step('the owner is told by mail and in the diary, and opens the very drawing', async () => {
    const mail = await mailTo(OWNER, ({ subject }) => subject.includes(TITLE));
    expect(mail.text).toContain(`/builds/${ORDER}/sign-offs/`);
    await owner.goto(`/builds/${ORDER}`);
    await owner.getByRole('link', { name: `Waits for you: sign “${TITLE}”` }).click();
    await expect(owner.getByRole('heading', { level: 1, name: TITLE })).toBeVisible();
    const href = await owner.getByRole('link', { name: 'Open the drawing' }).getAttribute('href');
    const answer = await ownerContext.request.get(href ?? '');
    expect(answer.headers()['content-type']).toBe('application/pdf');
    expect((await answer.body()).subarray(0, 5).toString()).toBe('%PDF-');
    expect(answer.url()).toContain(world.storeUrl);
  });

  await test.step('another name is refused and stays typed; their own signs', async () => {
    const name = owner.getByLabel('Type your name');
    await name.fill('Wanda');
    await owner.getByRole('button', { name: 'Sign', exact: true }).click();
    await expect(owner.getByText('Type your name as it stands on your account: Wanda Grabowska.')).toBeVisible();
    await expect(name).toHaveValue('Wanda');
    await name.fill('wanda grabowska');
    await owner.getByRole('button', { name: 'Sign', exact: true }).click();
    await expect(owner.getByText('Wanda Grabowska, on')).toBeVisible();
    await expect(owner.getByRole('button', { name: 'Sign', exact: true })).toHaveCount(0);
  });

  await test.step('the rep gets a mail, and the stage starts', async () => {
    await mailTo(people.rep, ({ subject }) => subject.includes('Wanda Grabowska') && subject.includes(TITLE));
    expect((await startStage(bench, stageId)).status).toBe(200);
  });
  expect(complaints.flat()).toEqual([]);
});
