import { Node } from '@tiptap/pm/model';
import { hasVisibleText } from './characters';
import type { NoteDoc } from './doc';
import { NOTE_LIMITS } from './limits';
import { noteText } from './plain-text';
import { rebuildNote } from './rebuild';
import { NoteRefusal } from './refusal';
import { noteSchema } from './schema';

export type CheckedNote = { ok: true; doc: NoteDoc; text: string } | { ok: false; message: string };

/**
 * The door every note passes before it is stored: limits, rebuild, document model, size in UTF-8 bytes, and words in it
 * unless `blank` allows a note that is all photos. `doc` is what to store, `text` its plain words; `message` is a
 * sentence for the writer. A RangeError is the document model's own refusal.
 */
export function checkNote(input: unknown, { blank = 'refused' }: { blank?: 'allowed' | 'refused' } = {}): CheckedNote {
  try {
    const doc = rebuildNote(input);
    Node.fromJSON(noteSchema, doc).check();
    requireSize(doc);
    if (blank === 'refused' && !hasWords(doc)) throw new NoteRefusal('blank');
    return { ok: true, doc, text: noteText(doc) };
  } catch (error) {
    if (error instanceof NoteRefusal) return { ok: false, message: error.message };
    if (error instanceof RangeError) return { ok: false, message: new NoteRefusal('broken').message };
    throw error;
  }
}

function requireSize(doc: NoteDoc): void {
  if (new TextEncoder().encode(JSON.stringify(doc)).length > NOTE_LIMITS.sizeBytes) throw new NoteRefusal('long');
}

function hasWords(doc: NoteDoc): boolean {
  return hasVisibleText(Node.fromJSON(noteSchema, doc).textContent);
}
