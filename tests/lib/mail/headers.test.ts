import { describe, expect, test } from 'vitest';
import { autoHeaders, requireHeader, requireSubject, UnsafeHeader, unsubscribeHeaders } from '@/lib/mail/headers';
import { requireMailLink, UnsafeLink } from '@/lib/mail/mail-link';
import { readReference } from '../../support/reference';

const rows = readReference('11_mail_headers');
const exact = (document: string, field: string) =>
  rows.find((row) => row.document?.startsWith(document) && row.field === field)?.exact_form ?? '';

describe('headers', () => {
  // RFC 8058, 3.1 and 8.1.
  test('of one-click unsubscribing are the two lines of RFC 8058', () => {
    const lines = Object.entries(unsubscribeHeaders('https://example.com/unsubscribe/opaquepart')).map(
      ([name, value]) => `${name}: ${value}`,
    );
    expect(lines).toEqual([
      exact('RFC 8058 sec. 3.1', 'List-Unsubscribe'),
      exact('RFC 8058 sec. 3.1', 'List-Unsubscribe-Post'),
    ]);
  });

  // RFC 8058, 8.1: the body the receiver posts is the second header's value, 26 octets.
  test('of one-click unsubscribing name the body that is posted back', () => {
    expect(unsubscribeHeaders('https://example.com/u')['List-Unsubscribe-Post']).toBe(
      exact('RFC 8058 sec. 8.1', 'HTTP body'),
    );
  });

  // RFC 3834, 5 (recalled, not seen).
  test('mark machine-made mail', () => {
    expect(`Auto-Submitted: ${autoHeaders()['Auto-Submitted']}`).toBe(exact('RFC 3834', 'Auto-Submitted'));
  });

  test('keep a bracket in the address from closing the header early', () => {
    expect(unsubscribeHeaders('https://example.com/u?t=a>,<https://b.test/')['List-Unsubscribe']).toBe(
      '<https://example.com/u?t=a%3E,%3Chttps://b.test/>',
    );
  });
});

describe('a line', () => {
  const breaks = ['\r\n', '\n', '\r', '\0', '\u000b', '\u000c', '\u0085', '\u2028', '\u2029', '\u001b', '\u009b', '\t'];

  test.each(breaks.map((mark) => ({ mark, code: mark.charCodeAt(0) })))(
    'with character $code in it is refused',
    ({ mark }) => {
      expect(() => requireSubject(`Your Nightjar${mark}Bcc: all@example.com`)).toThrow(UnsafeHeader);
      expect(() => requireHeader('X-Order', `Q-2417${mark}`)).toThrow(UnsafeHeader);
    },
  );

  test.each(['', 'X Order', 'X-Order:', 'X-Order\r\nBcc', 'X-Ördér'])('may not be named %j', (name) => {
    expect(() => requireHeader(name, 'Q-2417')).toThrow(UnsafeHeader);
  });

  test('in any script passes unchanged', () => {
    for (const subject of ['Tove Järvi asks about Q-2417', 'קשת', '${7*7} {{7*7}} <%= 7 %>', 'O\'Neill "the ear"']) {
      expect(requireSubject(subject)).toBe(subject);
    }
  });

  // RFC 5322, 2.1.1.
  test('holds 998 characters and no more', () => {
    expect(requireHeader('X-A', 'a'.repeat(993))).toHaveLength(993);
    expect(() => requireHeader('X-A', 'a'.repeat(994))).toThrow(UnsafeHeader);
  });
});

describe('a link in mail', () => {
  test.each([
    'https://diary.example.com/builds/Q-2417#entry',
    'http://127.0.0.1:3000/u/x',
    'http://localhost:3000/u/x',
  ])('may be %s', (url) => expect(requireMailLink(url)).toBe(url));

  test.each([
    'http://diary.example.com/',
    'javascript:alert(1)',
    'data:text/html,x',
    '//diary.example.com/',
    '/builds/Q-2417',
    '',
    'https://ruth@diary.example.com/',
    'http://localhost.example.com/',
    'mailto:ruth@example.com',
  ])('may not be %j', (url) => {
    expect(() => requireMailLink(url)).toThrow(UnsafeLink);
    expect(() => unsubscribeHeaders(url)).toThrow(UnsafeLink);
  });
});
