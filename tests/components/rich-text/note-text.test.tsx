import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, test } from 'vitest';
import { NoteText } from '@/components/rich-text/note-text';
import { noteHtml } from '@/lib/rich-text/mail-html';

function linked(...content: unknown[]) {
  return { type: 'doc', content: [{ type: 'paragraph', content }] };
}

function words(text: string, href?: string, ...marks: unknown[]) {
  return { type: 'text', text, marks: href ? [{ type: 'link', attrs: { href } }, ...marks] : marks };
}

describe.each([
  [
    'on the page',
    (doc: unknown, appUrlHost?: string) => renderToStaticMarkup(<NoteText doc={doc} appUrlHost={appUrlHost} />),
  ],
  ['in the mail', (doc: unknown, appUrlHost?: string) => noteHtml(doc, { appUrlHost })],
])('a note %s', (_where, render) => {
  test('shows where a foreign link leads', () => {
    const text = render(linked(words('the mill', 'https://mill.example/boards'))).replace(/<[^>]*>/g, '');
    expect(text).toBe('the mill (mill.example)');
  });

  test('is silent about links to this site', () => {
    const html = render(linked(words('the spec', 'https://diary.example/builds/Q-2417/spec')), 'diary.example');
    expect(html).not.toContain('(');
    expect(html).toContain('href="https://diary.example/builds/Q-2417/spec"');
  });

  test('draws a link of several words once', () => {
    const html = render(
      linked(
        words('the ', 'https://mill.example/'),
        words('mill', 'https://mill.example/', { type: 'bold' }),
        words(' now'),
      ),
    );
    expect(html.match(/<a /g)).toHaveLength(1);
    expect(html.replace(/<[^>]*>/g, '')).toBe('the mill (mill.example) now');
  });

  test('gives no hold to the page it links to', () => {
    expect(render(linked(words('x', 'https://mill.example/')))).toContain('rel="noopener nofollow ugc"');
  });

  test('says so when it cannot be shown', () => {
    expect(render({ type: 'doc', content: [{ type: 'image' }] })).toContain('This note could not be shown.');
  });
});

test('a list inside a list keeps its place', () => {
  const inner = { type: 'orderedList', content: [{ type: 'listItem', content: [{ type: 'paragraph' }] }] };
  const doc = {
    type: 'doc',
    content: [{ type: 'bulletList', content: [{ type: 'listItem', content: [{ type: 'paragraph' }, inner] }] }],
  };
  const shape = renderToStaticMarkup(<NoteText doc={doc} />).replace(/ class="[^"]*"| dir="auto"/g, '');
  expect(shape).toBe('<div><ul><li><p></p><ol><li><p></p></li></ol></li></ul></div>');
});
