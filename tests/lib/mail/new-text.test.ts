import { describe, expect, test } from 'vitest';
import { newTextOf } from '@/lib/mail/new-text';
import { noteOfText } from '@/lib/mail/reply-note';

const quote =
  '\n\nOn Tue, 1 Dec 2026 at 09:00, Quillhaven <diary@quillhaven.example> wrote:\n\n> Which wire is it?\n> \n> Wren';

describe('of a reply only the new words are kept', () => {
  test.each([
    { text: `The narrow one.${quote}`, says: 'The narrow one.' },
    { text: `The narrow one.\n\nNot the tall one.${quote}`, says: 'The narrow one.\n\nNot the tall one.' },
    { text: `The narrow one.\r\n\r\nSent from my phone${quote.replaceAll('\n', '\r\n')}`, says: 'The narrow one.' },
    { text: quote, says: '' },
    { text: '   \n ', says: '' },
  ])('$text', ({ text, says }) => expect(newTextOf({ text, html: null })).toBe(says));

  test('of one without a text part as well', () => {
    const html = '<p>The <b>narrow</b> one.</p><blockquote>Which wire is it?</blockquote><script>alert(1)</script>';
    expect(newTextOf({ text: null, html })).toBe('The narrow one.');
  });
});

test.each([
  '0000from<'.repeat(2000),
  'Op schreef '.repeat(2000),
  'On a b '.repeat(3000),
  `${'>'.repeat(20_000)}x`,
  '\n'.repeat(200_000),
  '<blockquote>'.repeat(15_000),
])('a text made to be slow costs less than two seconds', (text) => {
  const start = performance.now();
  newTextOf({ text, html: null });
  newTextOf({ text: null, html: text });
  expect(performance.now() - start).toBeLessThan(2000);
});

test('a note of it keeps paragraphs and lines, and no markup', () => {
  const note = noteOfText('One.\nTwo.\n\n<script>alert(1)</script>');
  expect(note).toMatchObject({ ok: true, text: 'One.\nTwo.\n\n<script>alert(1)</script>' });
  expect(noteOfText(' \n ')).toMatchObject({ ok: false });
});
