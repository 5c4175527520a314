import { getSchema } from '@tiptap/core';
import { Node } from '@tiptap/pm/model';
import { describe, expect, test } from 'vitest';
import { noteExtensions } from '@/components/rich-text/note-extensions';
import { checkNote } from '@/lib/rich-text/check';
import { NOTE_LIMITS } from '@/lib/rich-text/limits';
import { readNote } from '@/lib/rich-text/read';
import { noteSchema } from '@/lib/rich-text/schema';
import { harmlessNotes } from '../../support/hostile-notes';

const editorSchema = getSchema(noteExtensions(() => undefined));

function note(...content: unknown[]) {
  return { type: 'doc', content };
}

function said(text: string, ...marks: unknown[]) {
  return note({ type: 'paragraph', content: [{ type: 'text', text, marks }] });
}

function quotes(levels: number): unknown {
  let block: unknown = { type: 'paragraph' };
  for (let i = 0; i < levels; i++) block = { type: 'blockquote', content: [block] };
  return note(block);
}

describe('the document model', () => {
  test('has the nodes and marks of the editor, with the same content and in the same order', () => {
    const nodes = Object.entries(editorSchema.nodes).map(([name, type]) => [name, type.spec.content ?? '']);
    const ours = Object.entries(noteSchema.nodes).map(([name, type]) => [name, type.spec.content ?? '']);
    expect(ours.sort()).toEqual(nodes.sort());
    expect(Object.keys(noteSchema.marks)).toEqual(Object.keys(editorSchema.marks));
  });

  test.each(harmlessNotes)('keeps what the editor writes: $name', ({ note }) => {
    const written = Node.fromJSON(editorSchema, note).toJSON();
    expect(checkNote(written)).toMatchObject({ ok: true, doc: note });
    expect(Node.fromJSON(noteSchema, note).toJSON()).toEqual(note);
  });
});

describe('what the editor adds', () => {
  test('link targets, classes and list starts are dropped', () => {
    const link = {
      type: 'link',
      attrs: { href: 'https://example.com', target: '_blank', rel: 'x', class: null, title: 't' },
    };
    const item = {
      type: 'listItem',
      content: [{ type: 'paragraph', content: [{ type: 'text', text: 'a', marks: [link] }] }],
    };
    const list = { type: 'orderedList', attrs: { start: 3, type: 'a' }, content: [item] };
    const kept = { type: 'text', text: 'a', marks: [{ type: 'link', attrs: { href: 'https://example.com/' } }] };
    expect(checkNote(note(list))).toMatchObject({
      doc: note({
        type: 'orderedList',
        content: [{ type: 'listItem', content: [{ type: 'paragraph', content: [kept] }] }],
      }),
    });
  });

  test('empty paragraphs at the end are dropped, those between stay', () => {
    const empty = { type: 'paragraph' };
    const full = { type: 'paragraph', content: [{ type: 'text', text: 'a' }] };
    expect(checkNote(note(full, empty, full, empty, empty))).toMatchObject({ doc: note(full, empty, full) });
  });

  test('marks come out in one order and neighbours with the same marks are joined', () => {
    const a = { type: 'text', text: 'e', marks: [{ type: 'italic' }, { type: 'bold' }] };
    const b = { type: 'text', text: '\u0301', marks: [{ type: 'bold' }, { type: 'italic' }] };
    expect(checkNote(note({ type: 'paragraph', content: [a, b] }))).toMatchObject({
      doc: said('\u00e9', { type: 'bold' }, { type: 'italic' }),
    });
  });
});

describe('limits', () => {
  test(`${NOTE_LIMITS.depth} levels are kept, one more is refused`, () => {
    expect(checkNote(quotes(NOTE_LIMITS.depth - 2), { blank: 'allowed' }).ok).toBe(true);
    expect(checkNote(quotes(NOTE_LIMITS.depth - 1), { blank: 'allowed' })).toMatchObject({
      message: expect.stringContaining('too deep'),
    });
  });

  test(`${NOTE_LIMITS.nodes} nodes are kept, one more is refused`, () => {
    const breaks = (count: number) =>
      note({ type: 'paragraph', content: Array.from({ length: count }, () => ({ type: 'hardBreak' })) });
    expect(checkNote(breaks(NOTE_LIMITS.nodes - 2), { blank: 'allowed' }).ok).toBe(true);
    expect(checkNote(breaks(NOTE_LIMITS.nodes - 1), { blank: 'allowed' })).toMatchObject({
      message: expect.stringContaining('too long'),
    });
  });

  test('the size is counted in UTF-8 bytes of the stored JSON, to the byte', () => {
    const frame = JSON.stringify(checked('a')).length - 1;
    const fits = Math.floor((NOTE_LIMITS.sizeBytes - frame) / 3);
    const rest = 'a'.repeat(NOTE_LIMITS.sizeBytes - frame - fits * 3);
    expect(checkNote(said('\u6728'.repeat(fits) + rest)).ok).toBe(true);
    expect(checkNote(said(`${'\u6728'.repeat(fits)}${rest}a`))).toMatchObject({
      message: expect.stringContaining('too long'),
    });
  });

  test('every note that is kept can be read again from its column', () => {
    const frame = JSON.stringify(checked('a')).length - 1;
    const largest = checked('a'.repeat(NOTE_LIMITS.sizeBytes - frame));
    expect(readNote(JSON.stringify(largest))).toEqual(largest);
  });
});

function checked(text: string) {
  const result = checkNote(said(text));
  if (!result.ok) throw new Error(result.message);
  return result.doc;
}

describe('blank notes', () => {
  test.each(['', '   ', '\n\t', '\u200b\u00a0', '\u2800', '\u3164', '\u00ad\ufe0f'])('%j is no note', (text) => {
    expect(checkNote(said(text))).toMatchObject({ ok: false, message: expect.stringContaining('no words') });
    expect(checkNote(said(text), { blank: 'allowed' }).ok).toBe(true);
  });

  test.each(['.', '7', '\u6728', '\u{1f3b8}'])('%j is one', (text) => {
    expect(checkNote(said(text)).ok).toBe(true);
  });
});

describe.each([
  ['a field nobody writes', { ...said('x'), onclick: 'alert(1)' }],
  ['a field in a paragraph', note({ type: 'paragraph', style: 'x' })],
  ['an attribute of a link', said('x', { type: 'link', attrs: { href: 'https://example.com/', style: 'x' } })],
  ['an attribute of a list', note({ type: 'bulletList', attrs: { start: 3 }, content: [] })],
  ['heading level 1', note({ type: 'heading', attrs: { level: 1 } })],
  ['heading level 4', note({ type: 'heading', attrs: { level: 4 } })],
  ['the same mark twice', said('x', { type: 'bold' }, { type: 'bold' })],
  ['code beside another mark', said('x', { type: 'code' }, { type: 'italic' })],
])('%s', (_what, input) => {
  test('is refused when saved and not shown when read', () => {
    expect(checkNote(input, { blank: 'allowed' }).ok).toBe(false);
    expect(readNote(input)).toBeNull();
  });
});

test('a refusal says what is wrong', () => {
  expect(checkNote(note({ type: 'image', attrs: { src: 'x' } }))).toMatchObject({
    message: expect.stringContaining('picture'),
  });
  expect(checkNote(said('x', { type: 'link', attrs: { href: 'cid:1' } }))).toMatchObject({
    message: expect.stringContaining('link'),
  });
});

test('the plain words come with the note', () => {
  const item = (text: string) => ({
    type: 'listItem',
    content: [{ type: 'paragraph', content: [{ type: 'text', text }] }],
  });
  const heading = { type: 'heading', attrs: { level: 2 }, content: [{ type: 'text', text: 'Neck' }] };
  const list = { type: 'orderedList', content: [item('sand'), item('oil')] };
  const quote = {
    type: 'blockquote',
    content: [{ type: 'paragraph', content: [{ type: 'text', text: 'thin, please' }] }],
  };
  expect(checkNote(note(heading, list, quote))).toMatchObject({ text: 'Neck\n\n1. sand\n2. oil\n\n> thin, please' });
});
