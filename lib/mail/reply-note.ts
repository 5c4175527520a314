import { checkNote, type CheckedNote } from '@/lib/rich-text/check';

/** A blank line ends a paragraph; other line ends are kept. */
function paragraphOf(block: string) {
  const lines = block.split('\n').filter((line) => line.trim() !== '');
  const content = lines.flatMap((text, i) => [...(i > 0 ? [{ type: 'hardBreak' }] : []), { type: 'text', text }]);
  return { type: 'paragraph', content };
}

/** Plain text as a note, through the same door as every other. */
export function noteOfText(text: string): CheckedNote {
  const blocks = text.split(/\n[ \t]*\n/).filter((block) => block.trim() !== '');
  return checkNote({ type: 'doc', content: blocks.map(paragraphOf) });
}
