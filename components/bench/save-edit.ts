import { callShop, isPassing, type Answer } from '@/lib/photos/upload-answer';
import type { NoteDoc } from '@/lib/rich-text/doc';

export type EditState =
  | { step: 'writing' | 'saving' | 'saved' }
  /** Somebody saved in between; their words stay. */
  | { step: 'conflict'; message: string }
  | { step: 'signed-out'; message: string }
  /** `note` belongs to the note field. */
  | { step: 'refused'; message: string; note?: string };

const NO_SIGNAL = 'No signal, so nothing was saved. Your words are still here: save again when you are back in range.';
const BUSY = 'The shop does not answer just now. Your words are still here: save again in a moment.';
const SIGNED_OUT = 'You are signed out. Sign in in another tab, come back, and save again; your words stay here.';
const CONFLICT = 'Somebody saved this entry while you were writing. Copy your words before you open theirs.';
const GONE = 'This entry is no longer open to you. Copy your words if you need them.';
const REFUSED = 'This could not be saved. Look at the note again.';

/** Saves a note on top of `revision`. */
export async function saveEdit(entryId: string, revision: number, note: NoteDoc): Promise<EditState> {
  const url = `/api/entries/${encodeURIComponent(entryId)}`;
  return editStateOf(await callShop({ method: 'PATCH', url, body: { revision, note } }));
}

export function editStateOf(answer: Answer<object>): EditState {
  if (answer.kind === 'ok') return { step: 'saved' };
  if (answer.kind === 'no-signal') return { step: 'refused', message: NO_SIGNAL };
  const { status, message, fields } = answer;
  if (status === 401) return { step: 'signed-out', message: SIGNED_OUT };
  if (status === 409) return { step: 'conflict', message: message ?? CONFLICT };
  if (status === 404) return { step: 'refused', message: GONE };
  if (isPassing(status)) return { step: 'refused', message: status === 429 ? (message ?? BUSY) : BUSY };
  return { step: 'refused', message: message ?? REFUSED, note: fields?.note };
}
