import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { cleanLine } from '@/lib/rich-text/names';

const segmenter = new Intl.Segmenter('en', { granularity: 'grapheme' });

describe('cleanLine', () => {
  test.each([
    ['  Ann \t  Lee ', 'Ann Lee'],
    ['Re: neck\r\nBcc: eve@example.com', 'Re: neck Bcc: eve@example.com'],
    ['one\u2028two\u2029three', 'one two three'],
    ['photo\u202egpj.exe', 'photogpj.exe'],
    ['a\u0000b\u0007c\u0085d', 'abcd'],
    ['hi\u{e0068}\u{e0069}', 'hi'],
    ['x\udb40\u0000\udc41y', 'x\ufffd\ufffdy'],
    ['e\u0301', '\u00e9'],
    ['\u200b\u2800 ', ''],
    ['\u{1f3b8}\u{2ee5e}', '\u{1f3b8}\u{2ee5e}'],
    ['<b>O\u2019Neil & {{7*7}}</b>', '<b>O\u2019Neil & {{7*7}}</b>'],
  ])('%j becomes %j', (text, line) => {
    expect(cleanLine(text, 80)).toBe(line);
  });

  test('length is counted as a reader counts', () => {
    const family = '\u{1f468}\u200d\u{1f469}\u200d\u{1f467}';
    expect(cleanLine(family.repeat(5), 3)).toBe(family.repeat(3));
    expect(cleanLine('o\u0323\u0302'.repeat(4), 2)).toBe('\u1ed9\u1ed9');
  });

  test('a tower of accents is cut down', () => {
    expect(cleanLine(`a${'\u0489'.repeat(5_000)}b`, 10).length).toBeLessThanOrEqual(17);
  });

  test('any text gives one clean line within its length, and the same line the next time', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary' }), fc.integer({ min: 1, max: 20 }), (text, maxGraphemes) => {
        const line = cleanLine(text, maxGraphemes);
        expect(line).not.toMatch(/\p{Cc}|[\u2028\u2029\u202a-\u202e\u2066-\u2069]|\p{Cs}/u);
        expect([...segmenter.segment(line)].length).toBeLessThanOrEqual(maxGraphemes);
        expect(cleanLine(line, maxGraphemes)).toBe(line);
      }),
      { numRuns: 1_000 },
    );
  });
});
