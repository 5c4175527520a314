import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { markedExcerpt } from '@/lib/search/excerpt';
import { matchQuery, searchWords } from '@/lib/search/match';

describe('what is typed into the search', () => {
  test.each([
    ['fret wire', '"fret" "wire"'],
    ['"fret" AND (wire OR NOT neck*)', '"fret" "wire" "NOT" "neck"'],
    ['words : place ^ NEAR(a, b) -c {d} + e', '"words" "place" "NEAR" "b" "c" "d" "e"'],
    ['Järvi’s 25.5″', '"Järvi" "s" "25" "5"'],
    ['the heel of the neck', '"heel" "neck"'],
    ['to be or', '"to" "be" "or"'],
    ['  ', null],
    ['"*():^-', null],
  ])('%s becomes %s', (typed, query) => expect(matchQuery(searchWords(typed))).toBe(query));

  test('of any text only quoted words are left', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'grapheme', maxLength: 200 }), (typed) => {
        expect(matchQuery(searchWords(typed)) ?? '"a"').toMatch(/^("[\p{L}\p{N}\p{M}\p{Co}]+" ?)+$/u);
      }),
    );
  });

  test('as a beginning the last word is open, unless it is very short', () => {
    expect(matchQuery(['fret', 'boa'], 'begun')).toBe('"fret" "boa"*');
    expect(matchQuery(['fret', 'bo'], 'begun')).toBeNull();
  });

  test('many words and long ones are cut off', () => {
    expect(searchWords('b c d e f g h j k l m')).toHaveLength(8);
    expect(searchWords('x'.repeat(500))).toEqual(['x'.repeat(40)]);
  });
});

describe('an excerpt', () => {
  const hits = (text: string, typed: string, maxChars = 200) =>
    markedExcerpt(text, searchWords(typed), maxChars)
      .filter(({ isHit }) => isHit)
      .map((piece) => piece.text);

  test('marks what was looked for, whatever its accents, case and ending', () => {
    expect(hits('Tove Järvi coats it, then a second coating of clear coat.', 'jarvi COAT')).toEqual([
      'Järvi',
      'coats',
      'coating',
      'coat',
    ]);
    expect(hits('The notes of the neck.', 'otes')).toEqual([]);
  });

  test('shows the place of the first find, with the rest left out', () => {
    const text = `${'before '.repeat(60)}the lamp ${'after '.repeat(60)}`;
    const shown = markedExcerpt(text, ['lamp'], 80);
    const words = shown.map((piece) => piece.text).join('');
    expect(words).toContain('the lamp after');
    expect(words.startsWith('… ')).toBe(true);
    expect(words.endsWith(' …')).toBe(true);
    expect(words.length).toBeLessThan(100);
  });

  test('loses and adds no letter of a short text', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'grapheme', maxLength: 60 }), fc.string({ maxLength: 10 }), (text, typed) => {
        const joined = markedExcerpt(text, searchWords(typed), 1000)
          .map((piece) => piece.text)
          .join('');
        expect(joined).toBe(text.replace(/\s+/g, ' ').trim());
      }),
    );
  });
});
