import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, test } from 'vitest';
import { GET, POST } from '@/app/api/unsubscribe/[token]/route';
import { db, write } from '@/db/client';
import { editEntry, postEntry, releaseEntry, withdrawEntry } from '@/db/queries/entries';
import { claimDueReaders, writeDigests, type DueReader } from '@/db/queries/digests';
import { saveMailSettings, saveWording, unsubscribe } from '@/db/queries/mail-settings';
import { removeCompanion } from '@/db/queries/companions';
import { holdBuild } from '@/db/queries/holds';
import { closePerson } from '@/db/queries/people';
import { storeObject } from '@/lib/storage';
import { mailSettings, outbox, readings, readyWindows, users } from '@/db/schema';
import { writeDueDigests } from '@/lib/jobs/digests';
import { sendDueMail } from '@/lib/jobs/outbox';
import { showLine } from '@/lib/readings/measure-line';
import { readReference } from '../../support/reference';
import {
  DAY_MS,
  entryFor,
  makeBuild,
  makePerson,
  makePhoto,
  noteOf,
  NOW_MS,
  type Person,
  type TestBuild,
} from '../../support/world';
import { clock, openStandIns, runJobs } from './stand-ins';

const { database, mailsTo, behave } = await openStandIns();

beforeEach(async () => {
  await behave();
  clock.nowMs = NOW_MS;
});

/** 08:00 every day, UTC. */
const daily = { cadence: 'daily', hourLocal: 8, weekday: 1 } as const;
const atOnce = { cadence: 'at_once', hourLocal: 8, weekday: 1 } as const;

async function openBuild(over: { releaseNeeded?: boolean; wish?: typeof daily | typeof atOnce } = {}) {
  const [owner, companion] = [await makePerson('buyer'), await makePerson('buyer')];
  const [builder, rep] = [await makePerson('builder', { name: 'Wren Okafor' }), await makePerson('rep')];
  const staff = [
    { person: builder, cleared: true },
    { person: rep, cleared: true },
  ];
  const { releaseNeeded = false, wish = daily } = over;
  const build = await makeBuild({ owner, companions: [companion], staff, releaseNeeded });
  for (const reader of [owner, companion]) await saveMailSettings(reader, wish, 'UTC', NOW_MS);
  return { owner, companion, builder, rep, build };
}

const keepWindow = ({ id: buildId }: TestBuild) =>
  write((tx) =>
    tx.insert(readyWindows).values({
      buildId,
      givenOn: '2026-12-01',
      stageKey: 'wood',
      kind: 'window',
      earliestOn: '2027-01-20',
      latestOn: '2027-02-06',
      computedAt: NOW_MS,
    }),
  );

const post = ({ build, builder }: Awaited<ReturnType<typeof openBuild>>, text: string) =>
  postEntry(builder, entryFor(build, { note: noteOf(text) }), clock.nowMs);

const digestsOf = (person: Person) => db().select().from(outbox).where(eq(outbox.userId, person.id));
const settingsOf = async (person: Person) =>
  (await db().select().from(mailSettings).where(eq(mailSettings.userId, person.id)))[0];

const NEXT_8 = NOW_MS + 23 * 3_600_000;

describe('a digest', () => {
  test('tells each entry once, at the hour its reader chose, and then comes again only when there is something new', async () => {
    const diary = await openBuild();
    await post(diary, 'The top is joined.');
    clock.nowMs += 1;
    await post(diary, 'The back is thinned.');
    await runJobs(NEXT_8 - 1);
    expect(await mailsTo(diary.owner)).toEqual([]);
    await runJobs(NEXT_8);
    await runJobs(NEXT_8);
    await runJobs(NEXT_8 + DAY_MS);
    await post(diary, 'The neck is set.');
    await runJobs(NEXT_8 + 2 * DAY_MS);
    const mails = await mailsTo(diary.owner);
    expect(mails.map(({ subject }) => subject)).toHaveLength(2);
    expect(mails[0]?.text).toMatch(/The back is thinned\.[^]*The top is joined\./);
    expect(mails[1]?.text).toContain('The neck is set.');
    expect(mails[1]?.text).not.toContain('The top is joined.');
    expect((await settingsOf(diary.owner))?.nextDigestAt).toBe(NEXT_8 + 3 * DAY_MS);
  });

  test('says dates, measures and the ready window as its reader reads them', async () => {
    const diary = await openBuild();
    const wording = { locale: 'en-US', units: 'mm' } as const;
    await saveWording(diary.owner, wording);
    const nearMidnight = { timeZone: 'Asia/Tokyo' };
    await write((tx) => tx.update(users).set(nearMidnight).where(eq(users.id, diary.owner.id)));
    clock.nowMs = Date.UTC(2026, 11, 1, 20);
    const { id } = await post(diary, 'The frets are level.');
    const value = { kind: 'measure', name: 'Relief', measured: { text: '0.010', unit: 'in' } } as const;
    const row = { buildId: diary.build.id, entryId: id, position: 0, value, shown: showLine(value, null) };
    await write((tx) => tx.insert(readings).values(row));
    await keepWindow(diary.build);
    await runJobs(NEXT_8 + DAY_MS);
    const [[owners], [companions]] = [await mailsTo(diary.owner), await mailsTo(diary.companion)];
    expect(owners?.text).toMatch(/December 2[^]*Relief: 0\.254 mm$/m);
    expect(owners?.text).toContain('between January 20 and February 6, 2027');
    expect(owners?.text).not.toMatch(/0\.010 in|1 December/);
    expect(companions?.text).toMatch(/1 December[^]*Relief: 0\.010 in$/m);
    expect(companions?.text).toContain('between 20 January and 6 February 2027');
  });

  test('goes to a companion as well, and to nobody who wants none or belongs to another build', async () => {
    const [diary, other] = [await openBuild(), await openBuild()];
    const silent = await makePerson('buyer');
    await post(diary, 'The top is joined.');
    await runJobs(NEXT_8);
    expect(await mailsTo(diary.companion)).toHaveLength(1);
    expect(await mailsTo(silent)).toEqual([]);
    expect(await mailsTo(other.owner)).toEqual([]);
  });

  test('says nothing of shop-only, held or withdrawn entries, and nothing from before mail was wanted', async () => {
    const diary = await openBuild({ releaseNeeded: true });
    await post(diary, 'Waits for release.');
    await postEntry(diary.builder, entryFor(diary.build, { audience: 'shop', note: noteOf('For us only.') }), NOW_MS);
    const early = await post(diary, 'Released, then withdrawn.');
    await releaseEntry(diary.rep, early.id, NOW_MS);
    await withdrawEntry(diary.rep, early.id, NOW_MS);
    await runJobs(NEXT_8);
    expect(await mailsTo(diary.owner)).toEqual([]);
    expect(await digestsOf(diary.owner)).toEqual([]);
  });

  test('of a reader who wants mail at once comes with the next look at the outbox, once', async () => {
    const diary = await openBuild({ wish: atOnce });
    await runJobs(NOW_MS + 1000);
    await post(diary, 'The top is joined.');
    await runJobs();
    await runJobs(clock.nowMs + 60_000);
    expect(await mailsTo(diary.owner)).toHaveLength(1);
    await post(diary, 'The neck is set.');
    await runJobs();
    expect((await mailsTo(diary.owner)).map(({ text }) => text.includes('The neck is set.'))).toEqual([false, true]);
  });

  test('a reader woken again while their digest is written is looked at again, and nothing is told twice', async () => {
    const diary = await openBuild({ wish: atOnce });
    await runJobs(NOW_MS + 1000);
    const first = await post(diary, 'The top is joined.');
    const due = await claimUntil(diary.owner);
    clock.nowMs += 10;
    await post(diary, 'The neck is set.');
    expect(await writeDigests('mine', [digestOf(due, first.id)], clock.nowMs)).toBe(1);
    await runJobs();
    const texts = (await mailsTo(diary.owner)).map(({ text }) => text);
    expect(texts.filter((text) => text.includes('The top is joined.'))).toHaveLength(1);
    expect(texts.filter((text) => text.includes('The neck is set.'))).toHaveLength(1);
  });

  test('written by a worker that lost its lease is written by nobody else twice', async () => {
    const diary = await openBuild();
    const { id } = await post(diary, 'The top is joined.');
    clock.nowMs = NEXT_8;
    const due = await claimUntil(diary.owner);
    await runJobs(NEXT_8 + 61_000);
    expect(await writeDigests('mine', [digestOf(due, id)], clock.nowMs)).toBe(0);
    await runJobs();
    expect(await mailsTo(diary.owner)).toHaveLength(1);
  });

  test('claimed long ago by the same worker does not set the cursor back', async () => {
    const diary = await openBuild();
    const { id } = await post(diary, 'The top is joined.');
    clock.nowMs = NEXT_8;
    const old = await claimUntil(diary.owner);
    await runJobs(NEXT_8 + 61_000);
    await post(diary, 'The neck is set.');
    clock.nowMs = NEXT_8 + DAY_MS;
    const due = await claimUntil(diary.owner);
    expect(await writeDigests('mine', [digestOf(old, id)], clock.nowMs)).toBe(0);
    expect((await settingsOf(diary.owner))?.toldSeq).toBe(due.toldSeq);
    await runJobs(clock.nowMs + 61_000);
    expect((await mailsTo(diary.owner)).map(({ text }) => text.includes('The top is joined.'))).toEqual([true, false]);
  });

  test('moves the cursor and writes the mail together or not at all', async () => {
    const diary = await openBuild();
    const { id } = await post(diary, 'The top is joined.');
    clock.nowMs = NEXT_8;
    const due = await claimUntil(diary.owner);
    const before = await settingsOf(diary.owner);
    await database.client.execute(
      `CREATE TRIGGER no_mail BEFORE INSERT ON outbox BEGIN SELECT RAISE(ABORT, 'no mail today'); END`,
    );
    await expect(writeDigests('mine', [digestOf(due, id)], clock.nowMs)).rejects.toThrow();
    await database.client.execute('DROP TRIGGER no_mail');
    expect(await settingsOf(diary.owner)).toEqual(before);
    await runJobs(NEXT_8 + 61_000);
    expect(await mailsTo(diary.owner)).toHaveLength(1);
  });
});

const digestOf = (due: DueReader, entryId: string) => ({ due, entryIds: [entryId], newsIds: [] });

/** Takes due readers, as a job does, until it is this one's turn. */
async function claimUntil(person: Person) {
  for (;;) {
    const [due] = await claimDueReaders('mine', clock.nowMs, 60_000, 1);
    if (!due) throw new Error('not due');
    if (due.viewer.id === person.id) return due;
  }
}

describe('what a reader may see is looked at again when the mail goes out', () => {
  /** Writes the digest, lets something happen, and only then sends. */
  async function betweenWritingAndSending(
    diary: Awaited<ReturnType<typeof openBuild>>,
    happens: () => Promise<unknown>,
  ) {
    clock.nowMs = NEXT_8;
    await writeDueDigests('digests', clock.now);
    await happens();
    await sendDueMail('sender', clock.now);
    return { owner: await mailsTo(diary.owner), companion: await mailsTo(diary.companion) };
  }

  test('an entry withdrawn meanwhile is left out, and with the last one the mail', async () => {
    const [one, two] = [await openBuild(), await openBuild()];
    const gone = await post(one, 'Withdrawn.');
    await post(one, 'Stays.');
    const only = await post(two, 'The only one.');
    const sent = await betweenWritingAndSending(one, async () => {
      await withdrawEntry(one.builder, gone.id, clock.nowMs);
      await withdrawEntry(two.builder, only.id, clock.nowMs);
    });
    expect(sent.owner).toHaveLength(1);
    expect(sent.owner[0]?.text).toContain('Stays.');
    expect(sent.owner[0]?.html).not.toContain('Withdrawn.');
    expect(await mailsTo(two.owner)).toEqual([]);
    expect(await digestsOf(two.owner)).toMatchObject([{ state: 'dropped' }]);
  });

  test('an entry edited meanwhile is told as it reads now', async () => {
    const diary = await openBuild();
    const { id } = await post(diary, 'With a mistake.');
    const edit = { revision: 1, note: noteOf('Without one.') };
    const sent = await betweenWritingAndSending(diary, () => editEntry(diary.builder, id, edit, clock.nowMs));
    expect(sent.owner[0]?.text).toContain('Without one.');
    expect(sent.owner[0]?.text).not.toContain('With a mistake.');
  });

  test('a companion removed meanwhile, and a closed account, get nothing', async () => {
    const diary = await openBuild();
    const { build, owner, companion } = diary;
    await post(diary, 'The top is joined.');
    const sent = await betweenWritingAndSending(diary, async () => {
      await removeCompanion(owner, build.orderNumber, companion.id, clock.nowMs);
      await closePerson(await makePerson('admin'), owner.id, clock.nowMs);
    });
    expect(sent).toEqual({ owner: [], companion: [] });
  });

  test('of a build held from view meanwhile the owner learns only that there is news, and a companion nothing', async () => {
    const diary = await openBuild();
    const { build, rep, builder } = diary;
    const { id } = await post(diary, 'A secret inlay.');
    await makePhoto(build, builder, { entryId: id });
    const until = Date.now() + 90 * DAY_MS;
    const sent = await betweenWritingAndSending(diary, () => holdBuild(rep, build.orderNumber, until, clock.nowMs));
    expect(sent.companion).toEqual([]);
    expect(sent.owner).toHaveLength(1);
    const { headers, subject, text, html, attachments } = sent.owner[0] ?? {};
    expect(attachments).toEqual([]);
    const everything = JSON.stringify({ headers, subject, text, html });
    for (const secret of ['secret inlay', build.instrument, build.orderNumber, 'Wren Okafor', 'Wood room', id]) {
      expect(everything).not.toContain(secret);
    }
  });
});

test('a digest shows the entry’s photo inside the mail: attached, not fetched from anywhere', async () => {
  const diary = await openBuild();
  const photoId = await makePhoto(diary.build, diary.builder);
  await storeObject(`out/${photoId}/mail.jpg`, Buffer.from('a small jpeg'), 'image/jpeg');
  const photos = [{ id: photoId, alt: 'The joined top' }];
  await postEntry(diary.builder, entryFor(diary.build, { photos }), NOW_MS);
  await runJobs(NEXT_8);
  const [mail] = await mailsTo(diary.owner);
  expect(mail?.attachments).toEqual([expect.objectContaining({ contentId: 'photo-1', sizeBytes: 12 })]);
  expect(mail?.html).toContain('cid:photo-1');
  expect(mail?.html).not.toMatch(/<img[^>]+src="http/);
});

// RFC 8058, sections 3.1 and 8.1, as kept in tests/reference/11_mail_headers.csv.
describe('leaving with one click', () => {
  const rows = readReference('11_mail_headers').filter(({ document }) => document?.startsWith('RFC 8058 sec. 8.1'));
  const exact = (field: string) => rows.find((row) => row.field === field)?.exact_form ?? '';

  async function unsubscribeUrlOf(reader: Person): Promise<URL> {
    const [mail] = await mailsTo(reader);
    expect(mail?.headers['List-Unsubscribe-Post']).toBe(exact('HTTP body'));
    const [, address = ''] = /^<(https:[^>]+)>$/.exec(mail?.headers['List-Unsubscribe'] ?? '') ?? [];
    return new URL(address);
  }

  /** What lies at an address of the product that a POST reaches. */
  async function send(url: URL, method: 'GET' | 'POST'): Promise<Response> {
    const [, token = ''] = /^\/api\/unsubscribe\/([^/]+)$/.exec(url.pathname) ?? [];
    expect(token).not.toBe('');
    const params = Promise.resolve({ token: decodeURIComponent(token) });
    if (method === 'GET') return GET(new Request(url), { params });
    const headers = { 'Content-Type': 'application/x-www-form-urlencoded', Origin: 'https://mail.example' };
    return POST(new Request(url, { method, headers, body: exact('HTTP body') }), { params });
  }

  test('works by the address in the mail’s header, without cookies, and before the next digest', async () => {
    const diary = await openBuild();
    await post(diary, 'The top is joined.');
    await runJobs(NEXT_8);
    const url = await unsubscribeUrlOf(diary.owner);
    const answer = await send(url, 'POST');
    expect([200, 202]).toContain(answer.status);
    expect(await answer.text()).toBe('');
    await post(diary, 'The neck is set.');
    await runJobs(NEXT_8 + DAY_MS);
    expect(await mailsTo(diary.owner)).toHaveLength(1);
    expect(await mailsTo(diary.companion)).toHaveLength(2);
  });

  test('looking at the address changes nothing and leads to the page that asks', async () => {
    const diary = await openBuild();
    await post(diary, 'The top is joined.');
    await runJobs(NEXT_8);
    const answer = await send(await unsubscribeUrlOf(diary.owner), 'GET');
    expect(answer.status).toBe(303);
    expect(answer.headers.get('location')).toMatch(/^https:\/\/diary\.example\/unsubscribe\/./);
    expect((await settingsOf(diary.owner))?.cadence).toBe('daily');
  });

  test('with a token that is not ours, or of somebody else, gives the same answer and stops nobody', async () => {
    const [one, two] = [await openBuild(), await openBuild()];
    for (const token of ['', 'x', `${one.owner.id}.forged`, `${one.owner.id}.${'A'.repeat(43)}`, two.owner.id]) {
      const answer = await POST(new Request('https://diary.example', { method: 'POST' }), {
        params: Promise.resolve({ token }),
      });
      expect(answer.status).toBe(202);
    }
    for (const { owner } of [one, two]) expect((await settingsOf(owner))?.cadence).toBe('daily');
  });

  test('stops a digest that is already being written', async () => {
    const diary = await openBuild();
    const { id } = await post(diary, 'The top is joined.');
    clock.nowMs = NEXT_8;
    const due = await claimUntil(diary.owner);
    await unsubscribe(diary.owner.id);
    await writeDigests('mine', [digestOf(due, id)], clock.nowMs);
    await runJobs();
    expect(await mailsTo(diary.owner)).toEqual([]);
    expect(await settingsOf(diary.owner)).toMatchObject({ cadence: 'none', nextDigestAt: null });
  });

  test('stops a digest that is written and not yet sent', async () => {
    const diary = await openBuild();
    await post(diary, 'The top is joined.');
    clock.nowMs = NEXT_8;
    await writeDueDigests('digests', clock.now);
    await unsubscribe(diary.owner.id);
    await sendDueMail('sender', clock.now);
    expect(await mailsTo(diary.owner)).toEqual([]);
  });
});
