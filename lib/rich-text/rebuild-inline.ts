import { cleanText } from './characters';
import type { NoteInline, NoteMark, NoteWords } from './doc';
import { readFields, readList } from './fields';
import { NOTE_LIMITS } from './limits';
import { safeHref } from './links';
import { NoteRefusal } from './refusal';

/** The order the editor's schema ranks marks in; a set in another order is not equal to it. */
const MARK_ORDER = ['link', 'bold', 'code', 'italic'] as const;

/**
 * Text and line breaks rebuilt: text cleaned, what is empty after that left out, neighbours with the same marks joined.
 * @throws NoteRefusal with a sentence for the writer
 */
export function rebuildInline(input: unknown): NoteInline[] {
  const joined: NoteInline[] = [];
  for (const node of readList(input).map(inlineNode)) {
    const last = joined.at(-1);
    if (node.type === 'text' && node.text === '') continue;
    if (node.type === 'text' && last?.type === 'text' && sameMarks(node, last))
      last.text = cleanText(last.text + node.text);
    else joined.push(node);
  }
  return joined;
}

function inlineNode(input: unknown): NoteInline {
  const node = readFields(input, ['type', 'text', 'marks']);
  const marks = rebuildMarks(node.get('marks'));
  if (node.get('type') === 'hardBreak' && !node.has('text')) return { type: 'hardBreak' };
  if (node.get('type') !== 'text') throw new NoteRefusal('foreign');
  const raw = node.get('text');
  if (typeof raw !== 'string') throw new NoteRefusal('broken');
  const text = cleanText(raw);
  return marks.length > 0 ? { type: 'text', text, marks } : { type: 'text', text };
}

function rebuildMarks(input: unknown): NoteMark[] {
  const list = readList(input);
  if (list.length > NOTE_LIMITS.marksPerText) throw new NoteRefusal('marks');
  const marks = list.map(rebuildMark).sort((a, b) => MARK_ORDER.indexOf(a.type) - MARK_ORDER.indexOf(b.type));
  const repeated = marks.some((mark, i) => mark.type === marks[i + 1]?.type);
  const besideCode = marks.length > 1 && marks.some((mark) => mark.type === 'code');
  if (repeated || besideCode) throw new NoteRefusal('marks');
  return marks;
}

function rebuildMark(input: unknown): NoteMark {
  const mark = readFields(input, ['type', 'attrs']);
  const type = mark.get('type');
  if (type === 'link') return { type, attrs: { href: linkHref(mark.get('attrs')) } };
  if (type !== 'bold' && type !== 'code' && type !== 'italic') throw new NoteRefusal('foreign');
  if (mark.has('attrs')) readFields(mark.get('attrs'), []);
  return { type };
}

/** The editor writes target, rel, class and title too; they are the renderer's to choose and are dropped. */
function linkHref(attrs: unknown): string {
  const href = safeHref(readFields(attrs, ['href', 'target', 'rel', 'class', 'title']).get('href'));
  if (href === null) throw new NoteRefusal('link');
  return href;
}

function sameMarks(a: NoteWords, b: NoteWords): boolean {
  return JSON.stringify(a.marks) === JSON.stringify(b.marks);
}
