import { describe, expect, test } from 'vitest';
import { currentHref } from '@/components/shell/current-href';

describe('the link of the page one is on', () => {
  const hrefs = ['/', '/builds/Q-2417', '/builds/Q-2417/spec', '/questions'];

  test.each([
    { pathname: '/builds/Q-2417', expected: '/builds/Q-2417' },
    { pathname: '/builds/Q-2417/spec', expected: '/builds/Q-2417/spec' },
    { pathname: '/builds/Q-2417/people', expected: '/builds/Q-2417' },
    { pathname: '/questions/31', expected: '/questions' },
    { pathname: '/questions-archive', expected: '/' },
  ])('$pathname belongs to $expected', ({ pathname, expected }) => {
    expect(currentHref(pathname, hrefs)).toBe(expected);
  });

  test('a page under none of the links belongs to none', () => {
    expect(currentHref('/me', ['/floor', '/questions'])).toBeNull();
  });
});
