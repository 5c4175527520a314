import { describe, expect, test } from 'vitest';
import { renderMail } from '@/emails/render-mail';
import { oneOfEach, plainWords } from './samples';

const hostile = [
  '<script>alert(1)</script>',
  '<img src=https://track.example/x.gif>',
  '"><a href="https://evil.example/">here</a>',
  "' onmouseover='x",
  '</title><h1>x</h1>',
  '</style><b>x</b>',
  '<!-- --><!--[if mso]><b>x</b><![endif]-->',
  '{{7*7}} ${7*7} <%= 7*7 %> #{7*7}',
  '&lt;b&gt; &amp;',
  '$& $1 $`',
];

/** Every tag with the names of its attributes: a name that breaks out of its place adds to one or the other. */
const tagsOf = (html: string) =>
  [...html.matchAll(/<([a-z!/][^\s>]*)((?:[^>"]|"[^"]*")*)>/gi)].map(([, tag, rest = '']) =>
    [tag, ...[...rest.matchAll(/([\w-]+)=/g)].map(([, attribute]) => attribute)].join(' '),
  );

describe.each(hostile)('a person, shop, instrument and note called %j', (name) => {
  const words = { person: name, shopName: name, instrument: name, excerpt: name };
  const plain = oneOfEach({ ...plainWords, excerpt: 'one line' });

  test.each(oneOfEach(words))('add no markup to the $mail mail and stand in its text as written', async (each) => {
    const { html, text } = await renderMail(each.element);
    const harmless = plain.find(({ mail }) => mail === each.mail);
    const expected = await renderMail(harmless?.element ?? each.element);
    expect(tagsOf(html)).toEqual(tagsOf(expected.html));
    expect(text).toContain(name);
  });
});

test('a name written right to left is isolated in both parts and in the subject', async () => {
  const name = 'נועה';
  const asked = oneOfEach({ ...plainWords, person: name }).find(({ mail }) => mail === 'question');
  if (asked === undefined) throw new Error('no question');
  const { html, text } = await renderMail(asked.element);
  expect(asked.subject).toBe(`\u2068${name}\u2069 asks about Q-2417: Finish`);
  expect(html).toContain(`<bdi data-isolate="true">${name}</bdi>`);
  expect(text).toContain(`\u2068${name}\u2069`);
});
