import { asc, desc, eq } from 'drizzle-orm';
import { describe, expect, test } from 'vitest';
import { db, write } from '@/db/client';
import { listRefusedReplies } from '@/db/queries/mail-watch';
import { removeCompanion } from '@/db/queries/companions';
import { askQuestion } from '@/db/queries/questions';
import { assignments, letters, outbox, photos, providerEvents, users } from '@/db/schema';
import { newId } from '@/db/schema/columns';
import { sendDueMail } from '@/lib/jobs/outbox';
import { replyAddress } from '@/lib/mail/reply-address';
import { jpegWithExif } from '../../support/photo-fixtures';
import { makeBuild, makePerson, noteOf, type Person } from '../../support/world';
import { openInboundRoom } from './inbound-room';

const { mailsTo, reply, tell } = await openInboundRoom();

const send = () => sendDueMail('sender', Date.now);

async function openQuestion() {
  const [owner, builder] = [await makePerson('buyer'), await makePerson('builder', { department: 'neck' })];
  const build = await makeBuild({ owner, staff: [{ person: builder }] });
  const question = { entryId: null, topicId: 'neck-work', subject: 'Fret wire', idempotencyKey: newId() };
  const asked = { orderNumber: build.orderNumber, note: noteOf('Which wire is it?'), ...question };
  const { id } = await askQuestion(owner, asked, Date.now());
  await write((tx) => tx.update(outbox).set({ nextAttemptAt: 0 }));
  await send();
  const [mail] = await mailsTo(builder);
  if (!mail) throw new Error('no mail about the question');
  return { owner, builder, build, id, mail };
}

const lettersOf = (questionId: string) =>
  db()
    .select()
    .from(letters)
    .where(eq(letters.questionId, questionId))
    .orderBy(asc(letters.writtenAt), asc(letters.id));
const answersOf = async (questionId: string, writer: Person) =>
  (await lettersOf(questionId)).filter(({ authorId }) => authorId === writer.id);
const lastEvent = async () =>
  (await db().select().from(providerEvents).orderBy(desc(providerEvents.receivedAt)).limit(1))[0];

describe('an answer to a mail about a question', () => {
  test('becomes a letter with the new words alone, once', async () => {
    const { builder, id, mail } = await openQuestion();
    expect(mail.replyTo).toEqual([replyAddress(id, builder.id)]);
    expect(await reply(mail.id, { text: 'The narrow, tall one.\nIt is in the drawer.' })).toBe(200);
    const answers = await answersOf(id, builder);
    expect(answers).toMatchObject([{ side: 'shop', arrivedBy: 'mail' }]);
    expect(answers[0]?.bodyText).toBe('The narrow, tall one.\nIt is in the drawer.');
    expect(await lastEvent()).toMatchObject({ kind: 'email.received', outcome: 'letter', userId: builder.id });
  });

  test('brings its photo with it, checked and without its place', async () => {
    const { builder, id, mail } = await openQuestion();
    const bytes = await jpegWithExif({ widthPx: 800, heightPx: 600, orientation: 6, gps: true, seed: 1 });
    const photo = new File([new Uint8Array(bytes)], 'wire.jpg', { type: 'image/jpeg' });
    expect(await reply(mail.id, { text: 'See the photo.', photo })).toBe(200);
    const [letter] = await answersOf(id, builder);
    const kept = await db()
      .select()
      .from(photos)
      .where(eq(photos.letterId, letter?.id ?? ''));
    expect(kept).toMatchObject([{ state: 'ready', widthPx: 600, heightPx: 800, uploaderId: builder.id }]);
  });

  test('with a file that only says it is a photo keeps the words and leaves the file', async () => {
    const { builder, id, mail } = await openQuestion();
    const photo = new File(['<script>alert(1)</script>'], 'wire.jpg', { type: 'image/jpeg' });
    expect(await reply(mail.id, { text: 'See the photo.', photo })).toBe(200);
    const [letter] = await answersOf(id, builder);
    expect(
      await db()
        .select()
        .from(photos)
        .where(eq(photos.letterId, letter?.id ?? '')),
    ).toEqual([]);
    expect((await lastEvent())?.note).toContain('1 of its 1 attachments were not');
  });

  test('keeps no markup: tags are words, and hostile links stay text', async () => {
    const { builder, id, mail } = await openQuestion();
    await reply(mail.id, { text: '<img src=x onerror=alert(1)> javascript:alert(1)' });
    const [letter] = await answersOf(id, builder);
    expect(letter?.bodyText).toBe('<img src=x onerror=alert(1)> javascript:alert(1)');
    expect(letter?.body).not.toContain('"link"');
  });
});

describe('no letter, but a line for the admin, comes of an answer', () => {
  const about = async (happens: (open: Awaited<ReturnType<typeof openQuestion>>) => Promise<unknown>) => {
    const open = await openQuestion();
    const before = (await lettersOf(open.id)).length;
    await happens(open);
    expect(await lettersOf(open.id)).toHaveLength(before);
    const [newest] = await listRefusedReplies(await makePerson('admin'));
    return { ...open, newest };
  };

  test('from a stranger’s address, and the line says whose answer it may be', async () => {
    const { builder, newest } = await about(({ mail }) =>
      reply(mail.id, { from: 'stranger@elsewhere.example', text: 'Let me in.' }),
    );
    expect(newest).toMatchObject({ person: builder.name });
    expect(newest?.note).toBe('It came from another address than the one our mail went to.');
  });

  test('from somebody else on the question to an address that is not theirs', async () => {
    const { newest } = await about(({ mail, owner }) => reply(mail.id, { from: owner.email, text: 'As the shop.' }));
    expect(newest?.note).toContain('another address');
  });

  test('of somebody who was taken off the build meanwhile', async () => {
    const { newest } = await about(async ({ mail, builder }) => {
      await write((tx) => tx.update(assignments).set({ endedAt: 1 }).where(eq(assignments.userId, builder.id)));
      await reply(mail.id, { text: 'One more thing.' });
    });
    expect(newest?.note).toBe('Its writer can no longer read that question.');
  });

  test('of somebody whose account is closed', async () => {
    const { newest } = await about(async ({ mail, builder }) => {
      await write((tx) => tx.update(users).set({ disabledAt: 1 }).where(eq(users.id, builder.id)));
      await reply(mail.id, { text: 'One more thing.' });
    });
    expect(newest?.note).toContain('another address');
  });

  test('that a machine wrote (RFC 3834)', async () => {
    const { newest } = await about(({ mail }) => reply(mail.id, { text: 'I am away.', automatic: 'yes' }));
    expect(newest?.note).toBe('Not taken as an answer: it says that a machine sent it.');
  });

  test('that says nothing', async () => {
    const { newest } = await about(({ mail }) => reply(mail.id, { text: ' \n ' }));
    expect(newest?.note).toBe('It says nothing of its own.');
  });
});

test('a companion who is taken off gets no say by mail', async () => {
  const { owner, build, id } = await openQuestion();
  const companion = await makePerson('buyer');
  await removeCompanion(owner, build.orderNumber, companion.id, Date.now()).catch(() => undefined);
  expect(replyAddress(id, companion.id)).not.toBe(replyAddress(id, owner.id));
});

describe('what became of a mail', () => {
  const personOf = async ({ id }: Person) => (await db().select().from(users).where(eq(users.id, id)))[0];
  const mailOf = async ({ id }: Person) => (await db().select().from(outbox).where(eq(outbox.userId, id)))[0];

  test('is kept: delivered', async () => {
    const { builder, mail } = await openQuestion();
    expect(await tell(mail.id, 'delivered')).toBe(200);
    expect((await mailOf(builder))?.deliveredAt).toBeGreaterThan(0);
    expect(await personOf(builder)).toMatchObject({ unreachableWhy: null });
  });

  test.each(['bounced', 'complained'] as const)(
    '%s: its reader is unreachable, and no more mail goes out',
    async (why) => {
      const { owner, builder, build, mail } = await openQuestion();
      expect(await tell(mail.id, why)).toBe(200);
      expect(await personOf(builder)).toMatchObject({ unreachableWhy: why });
      const question = { entryId: null, topicId: 'neck-work', subject: 'More', idempotencyKey: newId() };
      await askQuestion(owner, { orderNumber: build.orderNumber, note: noteOf('And?'), ...question }, Date.now());
      await write((tx) => tx.update(outbox).set({ nextAttemptAt: 0 }).where(eq(outbox.state, 'waiting')));
      await send();
      expect(await mailsTo(builder)).toHaveLength(1);
      const states = await db().select({ state: outbox.state }).from(outbox).where(eq(outbox.userId, builder.id));
      expect(states.map(({ state }) => state).sort()).toEqual(['dropped', 'sent']);
    },
  );
});
