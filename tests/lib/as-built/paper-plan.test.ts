import { describe, expect, test } from 'vitest';
import { cutToPages } from '@/lib/as-built/paper-pages';
import { paperText } from '@/lib/as-built/paper-text';
import { readPictures } from '@/lib/as-built/pictures';
import type { AsBuiltRow } from '@/lib/as-built/sheet';

const row = (key: string): AsBuiltRow => ({
  key,
  label: 'Scale length',
  signed: '27 in',
  allowed: null,
  drawing: null,
  measured: null,
  within: null,
  state: 'open',
  stateWords: 'without proof',
  proof: null,
  entryId: null,
  photoId: null,
});
const group = (key: string, count: number) => ({
  key,
  name: key,
  rows: Array.from({ length: count }, (_, index) => row(`${key}-${index}`)),
});

describe('cutting a sheet to pages', () => {
  test('keeps every row, once and in order', () => {
    const groups = [group('body', 7), group('neck', 50), group('finish', 1)];
    const pages = cutToPages(groups, 300, () => true);
    expect(pages.flat().flatMap(({ rows }) => rows.map(({ key }) => key))).toEqual(
      groups.flatMap(({ rows }) => rows.map(({ key }) => key)),
    );
    expect(pages.length).toBeGreaterThan(3);
  });

  test('puts fewer rows on a page when they carry pictures', () => {
    const groups = [group('body', 60)];
    expect(cutToPages(groups, 700, () => true).length).toBeGreaterThan(cutToPages(groups, 700, () => false).length);
  });

  test('leaves no heading without a row at the foot of a page', () => {
    for (let firstPt = 0; firstPt < 700; firstPt += 7)
      for (const page of cutToPages([group('body', 3), group('neck', 3)], firstPt, () => false))
        for (const { rows } of page) expect(rows.length).toBeGreaterThan(0);
  });
});

test.each([
  ['F♯ B♭', 'F# Bb'],
  ['a\u0000b\u202ec', 'a b c'],
  ['e\u0301', 'é'],
  ['漢字 and 😀', '? and ?'],
])('paper writes %j as %j', (text, written) => {
  expect(paperText(text)).toBe(written);
});

test('pictures are read a few at a time, each once, and one that fails is left out', async () => {
  let open = 0;
  let most = 0;
  const asked: string[] = [];
  const read = async (key: string) => {
    asked.push(key);
    most = Math.max(most, (open += 1));
    await new Promise((resolve) => setTimeout(resolve, 1));
    open -= 1;
    if (key === 'gone') throw new Error('no such object');
    return key === 'other' ? Buffer.from('not a picture') : Buffer.from([0xff, 0xd8, 0xff]);
  };
  const keys = [...Array.from({ length: 30 }, (_, index) => `k${index % 20}`), 'gone', 'other'];
  const found = await readPictures(keys, read, 4);
  expect(found.size).toBe(20);
  expect(asked.sort()).toEqual([...new Set(keys)].sort());
  expect(most).toBe(4);
});
