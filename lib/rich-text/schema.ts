import { Schema } from '@tiptap/pm/model';
import { safeHref } from './links';

/**
 * The document model of the save path, a second opinion beside rebuildNote. Names, content and the order of marks are
 * those of the editor; attributes are only the ones that are stored.
 */
export const noteSchema = new Schema({
  nodes: {
    doc: { content: 'block+' },
    paragraph: { group: 'block', content: 'inline*' },
    heading: { group: 'block', content: 'inline*', attrs: { level: { validate: requireHeadingLevel } } },
    bulletList: { group: 'block list', content: 'listItem+' },
    orderedList: { group: 'block list', content: 'listItem+' },
    listItem: { content: 'paragraph block*' },
    blockquote: { group: 'block', content: 'block+' },
    hardBreak: { group: 'inline', inline: true },
    text: { group: 'inline' },
  },
  marks: {
    link: { attrs: { href: { validate: requireSafeHref } } },
    bold: {},
    code: { excludes: '_' },
    italic: {},
  },
});

function requireHeadingLevel(value: unknown): void {
  if (value !== 2 && value !== 3) throw new RangeError('heading level must be 2 or 3');
}

function requireSafeHref(value: unknown): void {
  if (value === null || safeHref(value) !== value)
    throw new RangeError('href must be a normalised web or mail address');
}
