import type { NoteDoc } from '@/lib/rich-text/doc';
import { readNote } from '@/lib/rich-text/read';
import { wordIn } from '@/lib/send-json';

/** A photo that has arrived at the shop and is in no letter yet. */
export type DraftPhoto = { photoId: string; alt: string };

/** What somebody has typed and not sent. The key goes with it: sent twice, it arrives once. */
export type Draft = {
  idempotencyKey: string;
  topicId: string;
  subject: string;
  note: NoteDoc | null;
  photos: DraftPhoto[];
};

export const newDraft = (): Draft => ({
  idempotencyKey: crypto.randomUUID(),
  topicId: '',
  subject: '',
  note: null,
  photos: [],
});

/** The draft kept on this device under `name`; null when there is none or it cannot be read. */
export function readDraft(name: string): Draft | null {
  try {
    const kept: unknown = JSON.parse(localStorage.getItem(name) ?? 'null');
    const idempotencyKey = wordIn(kept, 'idempotencyKey');
    if (!idempotencyKey || typeof kept !== 'object' || kept === null) return null;
    const note = 'note' in kept ? readNote(kept.note) : null;
    const photos = 'photos' in kept && Array.isArray(kept.photos) ? kept.photos.flatMap(photoIn) : [];
    return {
      idempotencyKey,
      topicId: wordIn(kept, 'topicId') ?? '',
      subject: wordIn(kept, 'subject') ?? '',
      note,
      photos,
    };
  } catch {
    return null;
  }
}

function photoIn(kept: unknown): DraftPhoto[] {
  const photoId = wordIn(kept, 'photoId');
  return photoId ? [{ photoId, alt: wordIn(kept, 'alt') ?? '' }] : [];
}

/** Keeps a draft on this device, or takes it away when it is empty. */
export function keepDraft(name: string, draft: Draft): void {
  try {
    if (isBlank(draft)) localStorage.removeItem(name);
    else localStorage.setItem(name, JSON.stringify(draft));
  } catch {
    // A browser that keeps nothing still sends; only a reload would lose the words.
  }
}

function isBlank({ topicId, subject, note, photos }: Draft): boolean {
  const hasWords = (note?.content ?? []).some((block) => 'content' in block);
  return topicId === '' && subject === '' && photos.length === 0 && !hasWords;
}
