import { readDraftNote, type BenchPhoto, type Draft } from './draft-state';
import { KEPT_FOR_PHOTOS, type Posting } from './posting-state';
import type { KeptDraft, KeptPhoto } from '@/lib/drafts';
import { nothingTyped } from '@/lib/readings/typed';
import { PHOTO_TYPES } from '@/lib/photos/limits';

export function blankDraft(idempotencyKey: string): Draft {
  return {
    idempotencyKey,
    note: null,
    stageId: null,
    startStage: false,
    audience: 'buyer',
    photos: [],
    readings: { typed: nothingTyped, stand: null },
    proves: [],
    posting: { step: 'writing' },
  };
}

/** What is written down of a draft; its photos' bytes are kept once, when they are chosen. */
export function toKept(draft: Draft): KeptDraft {
  const { idempotencyKey, note, stageId, startStage, audience, readings, proves, posting } = draft;
  const photos = draft.photos.map(({ uploadKey, alt, photoId }) => ({ uploadKey, alt, photoId }));
  const written = { idempotencyKey, note, stageId, startStage, audience, readings, proves };
  return { ...written, posting: postingMark(posting), photos };
}

function postingMark(posting: Posting): KeptDraft['posting'] {
  if (posting.step === 'sending') return 'sent';
  if (posting.step === 'kept') return posting.wasSent ? 'sent' : 'wanted';
  return 'no';
}

/** A kept draft, opened again. Every photo goes through its upload once more, which finds what has arrived before. */
export function fromKept(kept: { draft?: KeptDraft; photos: KeptPhoto[] }, freshKey: string): Draft {
  const { draft } = kept;
  const photos = inOrder(kept);
  if (!draft) return { ...blankDraft(freshKey), photos };
  const posting: Posting =
    draft.posting === 'no'
      ? { step: 'writing' }
      : { step: 'kept', message: KEPT_FOR_PHOTOS, isSignedOut: false, wasSent: draft.posting === 'sent' };
  return { ...blankDraft(draft.idempotencyKey), ...chosen(draft), note: readDraftNote(draft.note), photos, posting };
}

const chosen = ({ stageId, startStage, audience, readings, proves }: KeptDraft) => ({
  stageId,
  startStage,
  audience,
  readings: { typed: { ...nothingTyped, ...readings?.typed }, stand: readings?.stand ?? null },
  proves: proves ?? [],
});

function inOrder({ draft, photos }: { draft?: KeptDraft; photos: KeptPhoto[] }): BenchPhoto[] {
  const listed = draft?.photos ?? [];
  const place = ({ uploadKey }: KeptPhoto) => {
    const index = listed.findIndex((photo) => photo.uploadKey === uploadKey);
    return index < 0 ? listed.length : index;
  };
  return [...photos].sort((a, b) => place(a) - place(b)).flatMap((photo) => opened(photo, listed[place(photo)]));
}

function opened(photo: KeptPhoto, listed: KeptDraft['photos'][number] | undefined): BenchPhoto[] {
  const contentType = PHOTO_TYPES.find((type) => type === photo.contentType);
  if (!contentType) return [];
  return [{ ...photo, contentType, alt: listed?.alt ?? '', photoId: listed?.photoId, upload: { step: 'queued' } }];
}
