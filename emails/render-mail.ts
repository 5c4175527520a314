import type { ReactElement } from 'react';
import { render, toPlainText } from 'react-email';

// Headings keep their letters as written: a name in capitals is another name. A picture is told by its alternative text.
const inText = [
  ...['h1', 'h2'].map((selector) => ({ selector, options: { uppercase: false } })),
  { selector: 'img', format: 'image', options: { pathRewrite: () => '' } },
  { selector: 'bdi[data-isolate=true]', format: 'inlineSurround', options: { prefix: '\u2068', suffix: '\u2069' } },
];

/** Both parts of a mail from one source, so that neither says more than the other. */
export async function renderMail(element: ReactElement): Promise<{ html: string; text: string }> {
  const html = await render(element);
  return { html, text: toPlainText(html, { selectors: inText }) };
}
