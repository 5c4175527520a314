import type { NoteDoc } from './doc';
import { NOTE_LIMITS } from './limits';
import { rebuildNote } from './rebuild';

/**
 * A stored note, checked again before it is shown; null when it cannot be. Takes the JSON itself or its text, so that
 * a column read as text cannot break the query for its neighbours. Small enough for the browser. Never throws: every
 * failure, whatever its kind, must stay with its own row.
 */
export function readNote(stored: unknown): NoteDoc | null {
  try {
    return rebuildNote(typeof stored === 'string' ? parse(stored) : stored);
  } catch {
    return null;
  }
}

function parse(json: string): unknown {
  return json.length > NOTE_LIMITS.sizeBytes ? null : JSON.parse(json);
}
