import { eq, sql } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import { db, write } from '@/db/client';
import { entries, searchRows } from '@/db/schema';
import { openTestDatabase } from '../support/database';
import { makeBuild, makeEntry, makePerson, makeQuestion, openShop } from '../support/world';

await openTestDatabase();
beforeAll(openShop);

const found = (words: string) =>
  db().all<{ kind: string; id: string }>(
    sql`select ${searchRows.kind} as kind, ${searchRows.subjectId} as id from search_index join ${searchRows} on ${searchRows.seq} = search_index.rowid where search_index match ${words}`,
  );

describe('the full-text index', () => {
  test('follows an entry from its writing over an edit to its end', async () => {
    const author = await makePerson('builder');
    const id = await makeEntry(await makeBuild(), author, { text: 'The bridge plate is glued.' });
    expect(await found('plate')).toEqual([{ kind: 'entry', id }]);
    await write((tx) => tx.update(entries).set({ bodyText: 'The heel cap is glued.' }).where(eq(entries.id, id)));
    expect(await found('plate')).toEqual([]);
    expect(await found('heel')).toEqual([{ kind: 'entry', id }]);
    await write((tx) => tx.delete(entries).where(eq(entries.id, id)));
    expect(await found('heel')).toEqual([]);
    expect(await db().select().from(searchRows).where(eq(searchRows.subjectId, id))).toEqual([]);
  });

  test('finds letters, and keeps its numbers when the file is compacted', async () => {
    const asker = await makePerson('buyer');
    await makeQuestion(await makeBuild({ owner: asker }), asker);
    const before = await found('fret wire');
    expect(before).toHaveLength(1);
    await db().run(sql`vacuum`);
    expect(await found('fret wire')).toEqual(before);
  });
});
