import { describe, expect, test } from 'vitest';
import { RecentTexts } from '@/lib/recent-texts';

describe('recent texts', () => {
  test('hold no more characters than they may, and let go of what was asked for longest ago', () => {
    const texts = new RecentTexts(10);
    texts.set('a', '1234');
    texts.set('b', '1234');
    expect(texts.get('a')).toBe('1234');
    texts.set('c', '12');
    expect(['a', 'b', 'c'].map((key) => texts.get(key))).toEqual(['1234', '1234', '12']);
    texts.get('a');
    texts.set('d', '1234');
    expect(['a', 'b', 'c', 'd'].map((key) => texts.get(key))).toEqual(['1234', undefined, '12', '1234']);
  });

  test('count a text that is set anew once', () => {
    const texts = new RecentTexts(10);
    for (let i = 0; i < 5; i++) texts.set('a', `12345${i}`);
    texts.set('b', '1234');
    expect([texts.get('a'), texts.get('b')]).toEqual(['123454', '1234']);
  });

  test('do not keep a text that is longer than all of them may be', () => {
    const texts = new RecentTexts(3);
    texts.set('a', '1234');
    expect(texts.get('a')).toBeUndefined();
    texts.set('b', '123');
    expect(texts.get('b')).toBe('123');
  });
});
