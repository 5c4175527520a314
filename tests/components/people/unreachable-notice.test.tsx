import { renderToStaticMarkup } from 'react-dom/server';
import { expect, test } from 'vitest';
import { UnreachableNotice } from '@/components/people/unreachable-notice';

test.each([
  { why: 'bounced', todo: 'Call them, and ask for another one.' },
  { why: 'complained', todo: 'Call them, and ask how to reach them.' },
] as const)('an owner whose mail $why is named, with what to do about it', ({ why, todo }) => {
  const html = renderToStaticMarkup(<UnreachableNotice owners={[{ id: 'a', name: 'Maren Oyelaran', why }]} />);
  expect(html).toContain('<bdi>Maren Oyelaran</bdi> gets none of our mail');
  expect(html).toContain(todo);
});

test('an owner whom mail reaches is not spoken of', () => {
  expect(renderToStaticMarkup(<UnreachableNotice owners={[]} />)).toBe('');
});
