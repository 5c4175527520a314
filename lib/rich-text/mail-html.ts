import type { NoteBlock, NoteInline, NoteListItem, NoteWords } from './doc';
import { linkRuns, runWords, type LinkRun } from './link-runs';
import { shownHost } from './links';
import { readNote } from './read';
import { NOTE_PLACEHOLDER } from './refusal';

const STYLES = {
  paragraph: 'margin:0 0 14px;white-space:pre-wrap',
  heading: 'margin:20px 0 8px;font-weight:600;line-height:1.3;white-space:pre-wrap',
  list: 'margin:0 0 14px;padding-left:24px',
  quote: 'margin:0 0 14px;padding-left:14px;border-left:2px solid #c2cbcd',
  code: 'font-family:monospace',
  link: 'color:inherit;text-decoration:underline',
} as const;

const ENTITIES: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' };

/** Text made safe between tags and inside double-quoted attributes; the only way text enters the mail. */
export function escapeHtml(text: string): string {
  return text.replace(/[&<>"']/g, (character) => ENTITIES[character] ?? '');
}

/**
 * A note as HTML for a mail, styled inline. Every tag and attribute is written here; from the note come escaped text and
 * checked addresses. Total: what cannot be read becomes a sentence.
 * @param appUrlHost links to this host are not followed by their host in brackets
 */
export function noteHtml(stored: unknown, { appUrlHost }: { appUrlHost?: string } = {}): string {
  const doc = readNote(stored);
  if (!doc) return `<p style="${STYLES.paragraph}"><em>${escapeHtml(NOTE_PLACEHOLDER)}</em></p>`;
  return blocksHtml(doc.content, appUrlHost);
}

function blocksHtml(blocks: readonly NoteBlock[], appUrlHost?: string): string {
  return blocks.map((block) => blockHtml(block, appUrlHost)).join('');
}

function blockHtml(block: NoteBlock, appUrlHost?: string): string {
  switch (block.type) {
    case 'paragraph':
      return `<p style="${STYLES.paragraph}">${inlineHtml(block.content, appUrlHost)}</p>`;
    case 'heading':
      return block.attrs.level === 2
        ? `<h3 style="${STYLES.heading}">${inlineHtml(block.content, appUrlHost)}</h3>`
        : `<h4 style="${STYLES.heading}">${inlineHtml(block.content, appUrlHost)}</h4>`;
    case 'bulletList':
      return `<ul style="${STYLES.list}">${itemsHtml(block.content, appUrlHost)}</ul>`;
    case 'orderedList':
      return `<ol style="${STYLES.list}">${itemsHtml(block.content, appUrlHost)}</ol>`;
    case 'blockquote':
      return `<blockquote style="${STYLES.quote}">${blocksHtml(block.content, appUrlHost)}</blockquote>`;
  }
}

function itemsHtml(items: readonly NoteListItem[], appUrlHost?: string): string {
  return items.map((item) => `<li>${blocksHtml(item.content, appUrlHost)}</li>`).join('');
}

function inlineHtml(content: readonly NoteInline[] = [], appUrlHost?: string): string {
  return linkRuns(content)
    .map((run) => runHtml(run, appUrlHost))
    .join('');
}

function runHtml(run: LinkRun, appUrlHost?: string): string {
  const inner = run.parts.map((part) => (part.type === 'text' ? wordsHtml(part) : '<br>')).join('');
  if (run.href === null) return inner;
  const host = shownHost(run.href, runWords(run), appUrlHost);
  const link = `<a href="${escapeHtml(run.href)}" rel="noopener nofollow ugc" style="${STYLES.link}">${inner}</a>`;
  return host === null ? link : `${link} (${escapeHtml(host)})`;
}

function wordsHtml(words: NoteWords): string {
  return (words.marks ?? []).reduce((html, mark) => {
    switch (mark.type) {
      case 'bold':
        return `<strong>${html}</strong>`;
      case 'italic':
        return `<em>${html}</em>`;
      case 'code':
        return `<code style="${STYLES.code}">${html}</code>`;
      case 'link':
        return html;
    }
  }, escapeHtml(words.text));
}
