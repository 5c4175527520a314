import { describe, expect, test } from 'vitest';
import { diaryPage, parseCursor, type DiaryEntry } from '@/db/queries/diary';
import { readNote } from '@/lib/rich-text/read';
import type { Viewer } from '@/lib/viewer';
import { openTestDatabase } from '../support/database';
import { makeBuild, makeEntry, makePerson, makePhoto, NOW_MS, openShop } from '../support/world';

await openTestDatabase();
await openShop();

async function openDiary() {
  const [owner, builder] = [await makePerson('buyer'), await makePerson('builder')];
  return { owner, builder, build: await makeBuild({ owner, staff: [{ person: builder }] }) };
}

async function readWhole(viewer: Viewer, buildId: string): Promise<{ pages: number; entries: DiaryEntry[] }> {
  const entries: DiaryEntry[] = [];
  let cursor: string | null = null;
  for (let pages = 1; ; pages++) {
    const page: Awaited<ReturnType<typeof diaryPage>> = await diaryPage(viewer, buildId, parseCursor(cursor));
    entries.push(...page.entries);
    cursor = page.next;
    if (cursor === null) return { pages, entries };
  }
}

describe('paging through a diary', () => {
  test.each([0, 1, 12, 13, 24, 25, 40])(
    '%i entries of the same moment come once each, and no page is empty',
    async (n) => {
      const { owner, builder, build } = await openDiary();
      const ids: string[] = [];
      for (let i = 0; i < n; i++) ids.push(await makeEntry(build, builder, { datedAt: NOW_MS }));
      const { pages, entries } = await readWhole(owner, build.id);
      expect(entries.map(({ id }) => id).sort()).toEqual(ids.sort());
      expect(pages).toBe(Math.max(1, Math.ceil(n / 12)));
    },
  );

  test('comes newest first over mixed moments, and what is not for the reader takes no place on a page', async () => {
    const { owner, builder, build } = await openDiary();
    for (let i = 0; i < 30; i++) {
      await makeEntry(build, builder, { datedAt: NOW_MS + (i % 7) });
      await makeEntry(build, builder, { datedAt: NOW_MS + (i % 7), audience: 'shop' });
    }
    const { pages, entries } = await readWhole(owner, build.id);
    const moments = entries.map(({ datedAt }) => datedAt);
    expect(moments).toEqual([...moments].sort((a, b) => b - a));
    expect({ entries: entries.length, pages }).toEqual({ entries: 30, pages: 3 });
  });

  test.each(['', '12', 'x.y', '1.2.3', '9'.repeat(16) + '.a', "1.a' or 1=1 --", '-1.a', ' 1.a'])(
    'a place in it that this product did not write is no place: %j',
    (text) => {
      expect(parseCursor(text)).toBeNull();
    },
  );
});

const nested = (depth: number) => '['.repeat(depth) + ']'.repeat(depth);

// SECURITY.md P19: a bad row harms only itself.
describe.each([
  { kind: 'no JSON', body: '{"type":"doc","content":[' },
  { kind: 'nothing', body: '' },
  { kind: 'nested 900 deep', body: nested(900) },
  { kind: 'nested 4,000 deep', body: nested(4000) },
  { kind: 'JSON of another kind', body: '"<script>alert(1)</script>"' },
  {
    kind: 'a document of unknown nodes',
    body: '{"type":"doc","content":[{"type":"iframe","attrs":{"src":"//x.test"}}]}',
  },
])('an entry whose stored text is $kind', ({ body }) => {
  test('leaves its neighbours whole, keeps its own place, and is refused by the reader of notes', async () => {
    const { owner, builder, build } = await openDiary();
    await makeEntry(build, builder, { text: 'Before.', datedAt: NOW_MS - 1 });
    const bad = await makeEntry(build, builder, { body });
    await makeEntry(build, builder, { text: 'After.', datedAt: NOW_MS + 1 });
    const { entries } = await diaryPage(owner, build.id, null);
    expect(entries.map((entry) => readNote(entry.body) !== null)).toEqual([true, false, true]);
    expect(entries[1]?.id).toBe(bad);
  });
});

test('the client’s page holds nothing that is the shop’s: not the state, not the audience, not an id of its author', async () => {
  const { owner, builder, build } = await openDiary();
  const entryId = await makeEntry(build, builder);
  await makePhoto(build, builder, { entryId });
  const [entry] = (await diaryPage(owner, build.id, null)).entries;
  expect(Object.keys(entry ?? {}).sort()).toEqual(
    ['author', 'body', 'datedAt', 'department', 'edited', 'id', 'photos', 'readings', 'shows', 'stage'].sort(),
  );
  expect(Object.keys(entry?.photos[0] ?? {}).sort()).toEqual(['alt', 'blur', 'heightPx', 'id', 'widthPx', 'widthsPx']);
  expect(JSON.stringify(entry)).not.toContain(builder.id);
  expect(JSON.stringify(entry)).not.toContain(builder.email);
});
