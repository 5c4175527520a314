import type { NoteBlock, NoteDoc, NoteInline, NoteList, NoteParagraph } from './doc';
import { readNote } from './read';
import { NOTE_PLACEHOLDER } from './refusal';

/** The words of a note for searches, previews and plain mail: no addresses of links, lists with their marks. Total. */
export function noteText(stored: unknown): string {
  const doc = readNote(stored);
  return doc ? blocksText(doc.content) : NOTE_PLACEHOLDER;
}

/** Plain text as a note of paragraphs, one for each line; what the note field stores when its editor could not load. */
export function plainNote(text: string): NoteDoc {
  const lines = text.split(/\r\n?|\n/);
  return { type: 'doc', content: lines.map(lineParagraph) };
}

function lineParagraph(line: string): NoteParagraph {
  return line === '' ? { type: 'paragraph' } : { type: 'paragraph', content: [{ type: 'text', text: line }] };
}

function blocksText(blocks: readonly NoteBlock[]): string {
  return blocks.map(blockText).join('\n\n');
}

function blockText(block: NoteBlock): string {
  switch (block.type) {
    case 'paragraph':
    case 'heading':
      return inlineText(block.content ?? []);
    case 'blockquote':
      return hang('> ', '> ', blocksText(block.content));
    case 'bulletList':
    case 'orderedList':
      return listText(block);
  }
}

function listText(list: NoteList): string {
  return list.content
    .map((item, i) => {
      const bullet = list.type === 'orderedList' ? `${i + 1}. ` : '- ';
      return hang(bullet, ' '.repeat(bullet.length), item.content.map(blockText).join('\n'));
    })
    .join('\n');
}

function inlineText(content: readonly NoteInline[]): string {
  return content.map((node) => (node.type === 'text' ? node.text : '\n')).join('');
}

function hang(first: string, rest: string, text: string): string {
  return first + text.split('\n').join(`\n${rest}`);
}
