import type { NoteBlock, NoteDoc } from '@/lib/rich-text/doc';
import { plainNote } from '@/lib/rich-text/plain-text';

const isBlank = (block: NoteBlock | undefined) => block?.type === 'paragraph' && (block.content ?? []).length === 0;

/** A note with a phrase behind what was written so far, in paragraphs of its own. */
export function appendPhrase(note: NoteDoc | null, phrase: string): NoteDoc {
  const written = note?.content ?? [];
  const kept = isBlank(written.at(-1)) ? written.slice(0, -1) : written;
  return { type: 'doc', content: [...kept, ...plainNote(phrase).content] };
}
