import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, test } from 'vitest';
import { db, write } from '@/db/client';
import { listChoices, saveChoices } from '@/db/queries/mail-choices';
import { saveMailSettings } from '@/db/queries/mail-settings';
import { listTroubledReaders } from '@/db/queries/mail-watch';
import { insertMail, queueMail } from '@/db/queries/outbox';
import { builds, mailSettings, outbox, users } from '@/db/schema';
import { newId } from '@/db/schema/columns';
import { BadInput } from '@/lib/errors';
import { previewDigest } from '@/lib/jobs/preview-digest';
import { mailKinds, type MailKind } from '@/lib/mail/kinds';
import { DAY_MS, makeBuild, makePerson, makeQuestion, NOW_MS, type Person } from '../../support/world';
import { clock, openStandIns, runJobs } from './stand-ins';

const { mailsTo, behave } = await openStandIns();

beforeEach(async () => {
  await behave();
  clock.nowMs = NOW_MS;
});

/** A build that is ready, and a question on it that still waits: something to tell either side. */
async function openNews(over: { heldUntilAt?: number } = {}) {
  const [owner, rep] = [await makePerson('buyer'), await makePerson('rep')];
  const build = await makeBuild({ owner, staff: [{ person: rep, cleared: true }], ...over });
  await write((tx) => tx.update(builds).set({ readyAt: NOW_MS, shippedAt: NOW_MS }).where(eq(builds.id, build.id)));
  const questionId = await makeQuestion(build, owner, { penHolder: rep });
  const tell = (person: Person, kind: MailKind) =>
    write((tx) =>
      queueMail(
        tx,
        { kind, userId: person.id, about: { buildId: build.id, questionId }, dedupeKey: newId() },
        clock.nowMs,
      ),
    );
  return { owner, rep, build, tell };
}

const subjectsTo = async (person: Person) => (await mailsTo(person)).map(({ subject }) => subject);
const choose = (person: Person, kind: MailKind, choice: 'at_once' | 'digest' | 'never') =>
  saveChoices(person, [{ kind, choice }]);

describe('a kind of mail', () => {
  test('comes at once, in the digest or never, as its reader chose', async () => {
    const { owner, build, tell } = await openNews();
    await saveMailSettings(owner, { cadence: 'daily', hourLocal: 8, weekday: 1 }, 'UTC', NOW_MS);
    await choose(owner, 'ready', 'at_once');
    await choose(owner, 'shipped', 'digest');
    await tell(owner, 'ready');
    await tell(owner, 'shipped');
    await runJobs();
    expect(await subjectsTo(owner)).toEqual([`Your ${build.instrument} is ready`]);
    await runJobs(NOW_MS + DAY_MS);
    expect(await subjectsTo(owner)).toEqual([
      `Your ${build.instrument} is ready`,
      `Your ${build.instrument} is on its way`,
    ]);
    await choose(owner, 'ready', 'never');
    await tell(owner, 'ready');
    await runJobs(NOW_MS + 3 * DAY_MS);
    expect(await subjectsTo(owner)).toHaveLength(2);
  });

  test('chosen for the digest is told there once, with the same words', async () => {
    const { rep, build, tell } = await openNews();
    await choose(rep, 'question_overdue', 'digest');
    await tell(rep, 'question_overdue');
    clock.nowMs += 1;
    await tell(rep, 'quiet_build');
    await runJobs(NOW_MS + DAY_MS);
    await runJobs(NOW_MS + 2 * DAY_MS);
    const [mail, ...others] = await mailsTo(rep);
    expect(others).toEqual([]);
    expect(mail?.subject).toBe(`An answer about ${build.orderNumber} is overdue: The neck, and one more thing`);
    expect(mail?.text).toContain(`${build.orderNumber} has gone quiet`);
  });

  test('that always comes cannot be chosen away, nor can somebody else’s', async () => {
    const { owner } = await openNews();
    for (const kind of ['sign_in', 'invitation', 'sign_off', 'sign_off_reminder', 'held_entry'] as const)
      await expect(choose(owner, kind, 'never')).rejects.toThrow(BadInput);
    const kinds = (await listChoices(owner)).map(({ kind }) => kind);
    expect(kinds).toEqual(['letter', 'change_declined', 'ready', 'shipped', 'window_moved']);
  });

  test('of a held build says nothing of it, by itself or in the digest', async () => {
    const { owner, build, tell } = await openNews({ heldUntilAt: Date.now() + 90 * DAY_MS });
    await saveMailSettings(owner, { cadence: 'daily', hourLocal: 8, weekday: 1 }, 'UTC', NOW_MS);
    await choose(owner, 'shipped', 'digest');
    await tell(owner, 'ready');
    await tell(owner, 'shipped');
    await runJobs();
    await runJobs(NOW_MS + DAY_MS);
    const mails = await mailsTo(owner);
    expect(mails).toHaveLength(2);
    for (const secret of [build.instrument, build.orderNumber]) expect(JSON.stringify(mails)).not.toContain(secret);
  });
});

test.each(mailKinds.filter((kind) => kind !== 'digest'))(
  '%s about nothing that is left is dropped, not sent',
  async (kind) => {
    const person = await makePerson('rep');
    if (kind === 'invitation') return;
    await write((tx) => insertMail(tx, { kind, userId: person.id, about: {}, dedupeKey: newId() }, NOW_MS));
    await runJobs();
    const [row] = await db().select({ state: outbox.state }).from(outbox).where(eq(outbox.userId, person.id));
    expect(row?.state).toBe('dropped');
  },
);

describe('quiet hours', () => {
  test('hold a mail back without counting a try, and let a sign-off of the day through after them', async () => {
    const { owner, tell } = await openNews();
    const wish = { cadence: 'daily', hourLocal: 8, weekday: 1, quietFromHour: 20, quietToHour: 10 } as const;
    await saveMailSettings(owner, wish, 'UTC', NOW_MS);
    await tell(owner, 'ready');
    await runJobs();
    const [row] = await db().select().from(outbox).where(eq(outbox.userId, owner.id));
    expect(row).toMatchObject({
      state: 'waiting',
      attempts: 0,
      firstAttemptAt: null,
      nextAttemptAt: NOW_MS + 3_600_000,
    });
    expect(await mailsTo(owner)).toEqual([]);
    await runJobs(NOW_MS + 3_600_000);
    expect(await mailsTo(owner)).toHaveLength(1);
  });
});

describe('a reader whose time zone no longer exists', () => {
  test('gets the digest by UTC with a word about it, holds up nobody, and is on the admin’s list', async () => {
    const { owner, tell } = await openNews();
    const { owner: other, tell: tellOther } = await openNews();
    for (const person of [owner, other]) {
      await saveMailSettings(person, { cadence: 'daily', hourLocal: 8, weekday: 1 }, 'UTC', NOW_MS);
      await choose(person, 'ready', 'digest');
    }
    await write((tx) => tx.update(users).set({ timeZone: 'Europe/Atlantis' }).where(eq(users.id, owner.id)));
    await tell(owner, 'ready');
    await tellOther(other, 'ready');
    expect(await previewDigest(owner, NOW_MS)).toMatchObject({ photoCount: 0 });
    await runJobs(NOW_MS + DAY_MS);
    expect((await mailsTo(owner))[0]?.text).toContain('Our clocks no longer know the time zone Europe/Atlantis');
    expect(await mailsTo(other)).toHaveLength(1);
    const [settings] = await db().select().from(mailSettings).where(eq(mailSettings.userId, owner.id));
    expect(settings?.nextDigestAt).toBe(Date.UTC(2026, 11, 3, 8));
    const { astray } = await listTroubledReaders(await makePerson('admin'));
    expect(astray.map(({ id }) => id)).toContain(owner.id);
  });
});

// RFC 5322, 3.6.4, RFC 2919 and RFC 3834, as kept in tests/reference/11_mail_headers.csv.
test('a mail says what it belongs to: its own id, its thread, its list', async () => {
  const { owner, rep, tell } = await openNews();
  await saveMailSettings(owner, { cadence: 'daily', hourLocal: 8, weekday: 1 }, 'UTC', NOW_MS);
  await choose(owner, 'ready', 'digest');
  await tell(rep, 'question_due');
  await tell(rep, 'question_overdue');
  await tell(owner, 'ready');
  await runJobs(NOW_MS + DAY_MS);
  const [due, overdue] = await mailsTo(rep);
  expect(due?.headers['Message-ID']).toMatch(/^<mail\.[\w-]+@quillhaven\.example>$/);
  expect(due?.headers['Message-ID']).not.toBe(overdue?.headers['Message-ID']);
  expect(due?.headers.References).toMatch(/^<question\.[\w-]+@quillhaven\.example>$/);
  expect(overdue?.headers.References).toBe(due?.headers.References);
  const [digest] = await mailsTo(owner);
  expect(digest?.headers['List-Id']).toBe('Build diary <diary.quillhaven.example>');
  for (const mail of [due, overdue, digest]) expect(mail?.headers['Auto-Submitted']).toBe('auto-generated');
});

test('a name that would start a header line fails that mail alone, where an admin sees it', async () => {
  const [first, second] = [await openNews(), await openNews()];
  await write((tx) =>
    tx.update(builds).set({ instrument: 'Nightjar\r\nBcc: all@example.com' }).where(eq(builds.id, first.build.id)),
  );
  await first.tell(first.owner, 'ready');
  await second.tell(second.owner, 'ready');
  await runJobs();
  expect(await mailsTo(first.owner)).toEqual([]);
  expect(await mailsTo(second.owner)).toHaveLength(1);
  const [row] = await db().select().from(outbox).where(eq(outbox.userId, first.owner.id));
  expect(row).toMatchObject({ state: 'waiting', lastProblem: 'it could not be written: UnsafeHeader' });
});
