import type { NoteInline, NoteWords } from './doc';

export interface LinkRun {
  href: string | null;
  parts: NoteInline[];
}

/** Inline content cut where a link begins or ends, so that one link of several words is drawn, and named, once. */
export function linkRuns(content: readonly NoteInline[]): LinkRun[] {
  const runs: LinkRun[] = [];
  for (const part of content) {
    const href = part.type === 'text' ? hrefOf(part) : null;
    const last = runs.at(-1);
    if (last?.href === href) last.parts.push(part);
    else runs.push({ href, parts: [part] });
  }
  return runs;
}

/** The words of a run as a reader sees them. */
export function runWords(run: LinkRun): string {
  return run.parts.map((part) => (part.type === 'text' ? part.text : '\n')).join('');
}

function hrefOf(words: NoteWords): string | null {
  for (const mark of words.marks ?? []) if (mark.type === 'link') return mark.attrs.href;
  return null;
}
