import type { NoteBlock, NoteDoc, NoteListItem, NoteParagraph } from './doc';
import { readFields, readList } from './fields';
import { requireWithinLimits } from './measure';
import { rebuildInline } from './rebuild-inline';
import { NoteRefusal } from './refusal';

/**
 * A fresh canonical document from anything: nothing of the input is kept but the text and the few values read by name.
 * Attributes the editor writes and nobody needs are dropped; empty paragraphs at the end too. The recursion below is
 * safe because the depth is measured first.
 * @throws NoteRefusal with a sentence for the writer
 */
export function rebuildNote(input: unknown): NoteDoc {
  requireWithinLimits(input);
  const doc = readFields(input, ['type', 'attrs', 'content']);
  if (doc.get('type') !== 'doc') throw new NoteRefusal('broken');
  requireNoAttrs(doc);
  const content = rebuildBlocks(doc.get('content'));
  while (content.length > 1 && isEmptyParagraph(content.at(-1))) content.pop();
  return { type: 'doc', content };
}

function rebuildBlocks(input: unknown): NoteBlock[] {
  const blocks = readList(input).map(rebuildBlock);
  if (blocks.length === 0) throw new NoteRefusal('broken');
  return blocks;
}

function rebuildBlock(input: unknown): NoteBlock {
  const node = readFields(input, ['type', 'attrs', 'content']);
  const type = node.get('type');
  switch (type) {
    case 'paragraph':
      requireNoAttrs(node);
      return { type, ...inlineContent(node) };
    case 'heading':
      return { type, attrs: { level: headingLevel(node.get('attrs')) }, ...inlineContent(node) };
    case 'bulletList':
      requireNoAttrs(node);
      return { type, content: rebuildItems(node.get('content')) };
    case 'orderedList':
      if (node.has('attrs')) readFields(node.get('attrs'), ['start', 'type']);
      return { type, content: rebuildItems(node.get('content')) };
    case 'blockquote':
      requireNoAttrs(node);
      return { type, content: rebuildBlocks(node.get('content')) };
    default:
      throw new NoteRefusal('foreign');
  }
}

function rebuildItems(input: unknown): NoteListItem[] {
  const items = readList(input).map(rebuildItem);
  if (items.length === 0) throw new NoteRefusal('broken');
  return items;
}

function rebuildItem(input: unknown): NoteListItem {
  const node = readFields(input, ['type', 'attrs', 'content']);
  if (node.get('type') !== 'listItem') throw new NoteRefusal('foreign');
  requireNoAttrs(node);
  const content = rebuildBlocks(node.get('content'));
  if (content[0]?.type !== 'paragraph') throw new NoteRefusal('foreign');
  return { type: 'listItem', content };
}

function inlineContent(node: Map<string, unknown>): Pick<NoteParagraph, 'content'> {
  const content = rebuildInline(node.get('content'));
  return content.length > 0 ? { content } : {};
}

function headingLevel(attrs: unknown): 2 | 3 {
  const level = readFields(attrs, ['level']).get('level');
  if (level !== 2 && level !== 3) throw new NoteRefusal('foreign');
  return level;
}

function requireNoAttrs(node: Map<string, unknown>): void {
  if (node.has('attrs')) readFields(node.get('attrs'), []);
}

function isEmptyParagraph(block: NoteBlock | undefined): boolean {
  return block?.type === 'paragraph' && block.content === undefined;
}
