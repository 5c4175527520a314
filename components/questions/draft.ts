import type { NoteDoc } from '@/lib/rich-text/doc';
import { readNote } from '@/lib/rich-text/read';
import { wordIn } from '@/lib/send-json';

/** What somebody has typed and not sent. The key goes with it: sent twice, it arrives once. */
export type Draft = { idempotencyKey: string; topicId: string; subject: string; note: NoteDoc | null };

export const newDraft = (): Draft => ({ idempotencyKey: crypto.randomUUID(), topicId: '', subject: '', note: null });

/** The draft kept in this tab under `name`; null when there is none or it cannot be read. */
export function readDraft(name: string): Draft | null {
  try {
    const kept: unknown = JSON.parse(sessionStorage.getItem(name) ?? 'null');
    const idempotencyKey = wordIn(kept, 'idempotencyKey');
    if (!idempotencyKey) return null;
    const note = typeof kept === 'object' && kept !== null && 'note' in kept ? readNote(kept.note) : null;
    return { idempotencyKey, topicId: wordIn(kept, 'topicId') ?? '', subject: wordIn(kept, 'subject') ?? '', note };
  } catch {
    return null;
  }
}

/** Keeps a draft in this tab, or takes it away when it is empty. */
export function keepDraft(name: string, draft: Draft): void {
  try {
    if (isBlank(draft)) sessionStorage.removeItem(name);
    else sessionStorage.setItem(name, JSON.stringify(draft));
  } catch {
    // A browser that keeps nothing still sends; only a reload would lose the words.
  }
}

function isBlank({ topicId, subject, note }: Draft): boolean {
  return topicId === '' && subject === '' && (note?.content ?? []).every((block) => !('content' in block));
}
