import fc from 'fast-check';
import { createElement } from 'react';
import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, test } from 'vitest';
import { NoteText } from '@/components/rich-text/note-text';
import { checkNote } from '@/lib/rich-text/check';
import { noteHtml } from '@/lib/rich-text/mail-html';
import { noteText } from '@/lib/rich-text/plain-text';
import { readNote } from '@/lib/rich-text/read';
import { NOTE_PLACEHOLDER } from '@/lib/rich-text/refusal';
import { harmlessNotes, hostileNotes } from '../../support/hostile-notes';
import { harmsIn, readMarkup } from './markup';

const ORDERS = /(?![\n\t])\p{Cc}|[\u2028\u2029\u202a-\u202e\u2066-\u2069]|[\u{e0000}-\u{e007f}]|\p{Cs}/u;

function page(doc: unknown): string {
  return renderToStaticMarkup(createElement(NoteText, { doc }));
}

test('there are at least 150 hostile notes, each with its own name', () => {
  expect(hostileNotes.length).toBeGreaterThanOrEqual(150);
  expect(new Set(hostileNotes.map(({ name }) => name)).size).toBe(hostileNotes.length);
});

describe.each(hostileNotes)('hostile note, $name', ({ note, json }) => {
  test('is refused with a sentence or stored harmless', () => {
    const checked = checkNote(note);
    if (!checked.ok) return expect(checked.message).toMatch(/^[A-Z].+\.$/);
    expect(harmsIn(readMarkup(page(checked.doc)))).toEqual([]);
    expect(checked.text).not.toMatch(ORDERS);
    expect(JSON.stringify(checked.doc)).not.toMatch(/"(?:class|target|rel|title|style|start|on\w+)":/);
  });

  test.each([
    ['as an object', note],
    ['as a column of text', json],
  ])('put into the database %s, it harms no reader', (_how, stored) => {
    const onPage = readMarkup(page(stored));
    const inMail = readMarkup(noteHtml(stored));
    expect([...harmsIn(onPage), ...harmsIn(inMail)]).toEqual([]);
    expect(onPage.text + inMail.text + noteText(stored)).not.toMatch(ORDERS);
    expect(onPage.text === NOTE_PLACEHOLDER).toBe(readNote(stored) === null);
  });
});

test('the prototype of objects is as it was after every hostile note', () => {
  for (const { note } of hostileNotes) checkNote(note);
  expect('polluted' in {}).toBe(false);
});

describe.each(harmlessNotes)('harmless note, $name', ({ note, letters }) => {
  test('is stored as it was written', () => {
    expect(checkNote(note)).toMatchObject({ ok: true, doc: note });
    expect(readNote(JSON.stringify(note))).toEqual(note);
  });

  test('shows every letter, in order, on the page, in the mail and as plain text', () => {
    const shown = [readMarkup(page(note)).text, readMarkup(noteHtml(note)).text];
    for (const text of shown) expect(inOrder(text, letters)).toBe(true);
    if (letters.length === 1) expect([...shown, noteText(note)]).toEqual([letters[0], letters[0], letters[0]]);
    else expect(inOrder(noteText(note), letters)).toBe(true);
  });
});

function inOrder(text: string, pieces: readonly string[]): boolean {
  let at = 0;
  return pieces.every((piece) => {
    const found = text.indexOf(piece, at);
    at = found + piece.length;
    return found >= 0;
  });
}

const node = fc.letrec((tie) => ({
  any: fc.oneof(
    { depthSize: 'medium' },
    fc.record(
      {
        type: fc.constantFrom(
          'doc',
          'paragraph',
          'heading',
          'bulletList',
          'orderedList',
          'listItem',
          'blockquote',
          'text',
          'hardBreak',
          'image',
        ),
        text: fc.oneof(fc.string({ unit: 'binary' }), fc.constant('<script>')),
        attrs: fc.oneof(fc.constant({ level: 2 }), fc.jsonValue()),
        content: fc.array(tie('any'), { maxLength: 4 }),
        marks: fc.array(
          fc.record(
            {
              type: fc.constantFrom('bold', 'italic', 'code', 'link', 'blink'),
              attrs: fc.record({ href: fc.oneof(fc.webUrl(), fc.string(), fc.constant('javascript:alert(1)')) }),
            },
            { requiredKeys: ['type'] },
          ),
          { maxLength: 3 },
        ),
      },
      { requiredKeys: ['type'] },
    ),
    fc.jsonValue(),
  ),
})).any;

const block = fc.letrec((tie) => ({
  block: fc.oneof(
    { depthSize: 'small' },
    fc.record({
      type: fc.constant('paragraph'),
      content: fc.array(
        fc.oneof(
          fc.record({
            type: fc.constant('text'),
            text: fc.string({ unit: 'binary' }),
            marks: fc.subarray([
              { type: 'bold' },
              { type: 'italic' },
              { type: 'link', attrs: { href: 'https://example.com' } },
            ]),
          }),
          fc.constant({ type: 'hardBreak' }),
        ),
        { maxLength: 5 },
      ),
    }),
    fc.record({ type: fc.constant('blockquote'), content: fc.array(tie('block'), { minLength: 1, maxLength: 3 }) }),
  ),
}));

describe('for any JSON', () => {
  test('the page, the mail and the plain text come out, and come out harmless', () => {
    fc.assert(
      fc.property(
        fc.oneof(
          fc.jsonValue(),
          node,
          fc.array(node).map((content) => ({ type: 'doc', content })),
        ),
        (stored) => {
          expect(harmsIn(readMarkup(page(stored)))).toEqual([]);
          expect(harmsIn(readMarkup(noteHtml(stored)))).toEqual([]);
          expect(typeof noteText(stored)).toBe('string');
          expect(typeof checkNote(stored).ok).toBe('boolean');
        },
      ),
      { numRuns: 300 },
    );
  });

  test('what was stored once is stored the same again', () => {
    const notes = fc.array(block.block, { minLength: 1, maxLength: 4 }).map((content) => ({ type: 'doc', content }));
    fc.assert(
      fc.property(notes, (note) => {
        const first = checkNote(note, { blank: 'allowed' });
        if (!first.ok) throw new Error(first.message);
        expect(checkNote(first.doc, { blank: 'allowed' })).toEqual(first);
        expect(readNote(JSON.stringify(first.doc))).toEqual(first.doc);
      }),
      { numRuns: 200 },
    );
  });
});
