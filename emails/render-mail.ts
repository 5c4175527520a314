import type { ReactElement } from 'react';
import { plainText } from './plain-text';

// Loaded when the first mail is written: a page's own bundle may not hold it.
const server = () => import('react-dom/server');

/** What mail programs take to mean: lay it out by the standard, tables included. */
const DOCTYPE =
  '<!DOCTYPE html PUBLIC "-//W3C//DTD XHTML 1.0 Transitional//EN" "http://www.w3.org/TR/xhtml1/DTD/xhtml1-transitional.dtd">';

/** Both parts of a mail from one source, so that neither says more than the other. */
export async function renderMail(element: ReactElement): Promise<{ html: string; text: string }> {
  const html = `${DOCTYPE}${(await server()).renderToStaticMarkup(element)}`;
  return { html, text: plainText(html) };
}
