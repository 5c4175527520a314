import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import { write } from '@/db/client';
import { searchAll } from '@/db/queries/search';
import { entries, standingAssignments } from '@/db/schema';
import { openTestDatabase } from '@/tests/support/database';
import { askOn, openThread, writeOn } from '@/tests/support/question-world';
import { DAY_MS, makeBuild, makeEntry, makePerson, NOW_MS, openShop } from '@/tests/support/world';
import type { Viewer } from '@/lib/viewer';

await openTestDatabase();
beforeAll(openShop);

const found = async (viewer: Viewer, typed: string) =>
  (await searchAll(viewer, typed, null)).hits.map(({ pieces }) => pieces.map(({ text }) => text).join(''));

describe('the search', () => {
  test('finds entries and letters by all of the words, whole or as another form, and the newest first', async () => {
    const { owner, builder, rep, build } = await openThread();
    await makeEntry(build, builder, { text: 'The heel cap is glued.' });
    const { id } = await askOn(build, owner, { text: 'Is the heel cap ebony?' });
    await writeOn(builder, id, NOW_MS + 1, 'Yes, ebony heel caps only.');
    expect(await found(rep, 'heel caps')).toEqual([
      'Yes, ebony heel caps only.',
      'Is the heel cap ebony?',
      'The heel cap is glued.',
    ]);
    expect(await found(rep, 'EBONY heel')).toHaveLength(2);
    expect(await found(rep, 'heel spruce')).toEqual([]);
    expect(await found(rep, 'heel ebo')).toHaveLength(2);
  });

  test('gives the client side what is published for it, and companions no letters', async () => {
    const { owner, companion, builder, painter, build } = await openThread();
    await makeEntry(build, builder, { text: 'Zircon dots, published.' });
    await makeEntry(build, builder, { text: 'Zircon dots, the shop’s own.', audience: 'shop' });
    await makeEntry(build, builder, { text: 'Zircon dots, held.', state: 'held' });
    await makeEntry(build, builder, { text: 'Zircon dots, withdrawn.', state: 'withdrawn' });
    await askOn(build, owner, { text: 'Zircon, really?' });
    await askOn(build, owner, { topicId: 'money', text: 'What does the zircon cost?' });
    expect(await found(owner, 'zircon')).toEqual([
      'What does the zircon cost?',
      'Zircon, really?',
      'Zircon dots, published.',
    ]);
    expect(await found(companion, 'zircon')).toEqual(['Zircon dots, published.']);
    expect(await found(painter, 'zircon')).toEqual([
      'Zircon, really?',
      'Zircon dots, held.',
      'Zircon dots, the shop’s own.',
      'Zircon dots, published.',
    ]);
  });

  test('shows nothing of a build out of reach, held from view or left, to anybody', async () => {
    const { owner, builder, rep, companion, build } = await openThread({ heldUntilAt: Date.now() + DAY_MS });
    await makeEntry(build, builder, { text: 'Obsidian knobs.' });
    const others = [companion, builder, await makePerson('rep'), await makePerson('admin'), await makePerson('buyer')];
    for (const other of others) expect(await found(other, 'obsidian')).toEqual([]);
    for (const reader of [owner, rep]) expect(await found(reader, 'obsidian')).toEqual(['Obsidian knobs.']);
  });

  test('looks everywhere for whom a rule puts on more builds than can be named', async () => {
    const [author, lead] = [await makePerson('builder'), await makePerson('builder')];
    await write((tx) => tx.insert(standingAssignments).values({ userId: lead.id, startedAt: 0 }));
    for (let n = 0; n < 45; n++) {
      const build = await makeBuild();
      await makeEntry(build, author, { text: `Tourmaline number ${n}.` });
    }
    const first = await searchAll(lead, 'tourmaline', null);
    expect([first.hits.length, first.hits[0]?.pieces.at(-1)?.text]).toEqual([30, ' number 44.']);
    const second = await searchAll(lead, 'tourmaline', first.next);
    expect([second.hits.length, second.next, second.hits.at(-1)?.pieces.at(-1)?.text]).toEqual([
      15,
      null,
      ' number 0.',
    ]);
  });

  test('follows an edit, and takes any text without failing', async () => {
    const { owner, builder, build } = await openThread();
    const id = await makeEntry(build, builder, { text: 'Malachite binding.' });
    await write((tx) => tx.update(entries).set({ bodyText: 'Jasper binding.' }).where(eq(entries.id, id)));
    expect(await found(owner, 'malachite')).toEqual([]);
    expect(await found(owner, 'jasper')).toEqual(['Jasper binding.']);
    const place = Buffer.from(build.id).toString('hex');
    for (const typed of ['"', '*', 'NEAR(', 'a AND', '-x', 'words:jasper)', '\u0000', '(((', 'x'.repeat(5000), place])
      expect(await found(owner, typed)).toEqual([]);
  });
});
