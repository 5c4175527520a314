import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { safeHref, shownHost, typedHref } from '@/lib/rich-text/links';

describe('safeHref', () => {
  test.each([
    ['https://example.com', 'https://example.com/'],
    ['HTTP://EXAMPLE.com:80/A b', 'http://example.com/A%20b'],
    ['https://b\u00fccher.example/', 'https://xn--bcher-kva.example/'],
    ['https://example.com/?a=1&b="2"#c', 'https://example.com/?a=1&b=%222%22#c'],
    ['https://example.com/a/../b', 'https://example.com/b'],
    ['mailto:Ann.Lee+wood@example.com', 'mailto:Ann.Lee+wood@example.com'],
    ['MAILTO:ann@example.com?bcc=eve@example.com', 'mailto:ann@example.com'],
  ])('%s is kept as %s', (raw, href) => {
    expect(safeHref(raw)).toBe(href);
  });

  test.each([
    'https:example.com',
    '//example.com',
    ' https://example.com',
    'https://a@example.com',
    'mailto:',
    'ftp://example.com',
    7,
    null,
  ])('%j leads nowhere we go', (raw) => {
    expect(safeHref(raw)).toBeNull();
  });

  test('a kept address is kept unchanged the next time', () => {
    fc.assert(
      fc.property(
        fc.oneof(
          fc.webUrl({ withQueryParameters: true, withFragments: true }),
          fc.string().map((tail) => `https://example.com/${tail}`),
        ),
        (raw) => {
          const href = safeHref(raw);
          expect(href === null ? null : safeHref(href)).toBe(href);
        },
      ),
    );
  });
});

describe('typedHref', () => {
  test.each([
    ['example.com', 'https://example.com/'],
    [' example.com/a b ', 'https://example.com/a%20b'],
    ['example.com:8080/x', 'https://example.com:8080/x'],
    ['ann@example.com', 'mailto:ann@example.com'],
    ['http://example.com', 'http://example.com/'],
    ['javascript:alert(1)', null],
    ['javascript.example:alert(1)', null],
    ['wood', null],
    ['', null],
  ])('%j means %j', (typed, href) => {
    expect(typedHref(typed)).toBe(href);
  });
});

describe('shownHost', () => {
  test.each([
    ['our page', 'example.com'],
    ['bank.example', 'example.com'],
    ['bank.example/example.com', 'example.com'],
    ['example.com.bank.example', 'example.com'],
    ['example.community', 'example.com'],
    ['example.com@bank.example', 'example.com'],
    ['example.com', null],
    ['https://Example.com/a', null],
    ['example.com, the maker of it', 'example.com'],
    ['example.com has it', null],
  ])('behind the words %j stands %j', (words, host) => {
    expect(shownHost('https://example.com/a', words)).toBe(host);
  });

  test('a mail link shows its address, a link to this site nothing', () => {
    expect(shownHost('mailto:ann@example.com', 'write to us')).toBe('ann@example.com');
    expect(shownHost('mailto:ann@example.com', 'ann@example.com')).toBeNull();
    expect(shownHost('https://diary.example/builds/Q-2417', 'the build', 'diary.example')).toBeNull();
  });
});
