import type { UploadFile } from '@/lib/photos/upload';
import type { UploadState } from '@/lib/photos/upload-state';
import { noteText } from '@/lib/rich-text/plain-text';
import { readNote } from '@/lib/rich-text/read';
import type { NoteDoc } from '@/lib/rich-text/doc';

export type BenchPhoto = UploadFile & { alt: string; upload: UploadState };
export type Audience = 'buyer' | 'shop';
export type ProblemField = 'note' | 'photos' | 'stageId' | 'audience';
export type Problem = { message?: string; fields: Partial<Record<ProblemField, string>> };

/** How far the entry itself is. Only while it is being written may anything in it change. */
export type Posting =
  | { step: 'writing'; problem?: Problem }
  /** To be posted as soon as that can be done; `wasSent`: a try went unanswered and may have arrived. */
  | { step: 'kept'; message: string; isSignedOut: boolean; wasSent: boolean }
  | { step: 'sending'; wasSent: boolean }
  | { step: 'posted'; entryId: string; isHeld: boolean };

export type Draft = {
  idempotencyKey: string;
  note: NoteDoc | null;
  stageId: string | null;
  startStage: boolean;
  audience: Audience;
  photos: BenchPhoto[];
  posting: Posting;
};

export type DraftEvent =
  | { type: 'written'; note: NoteDoc }
  | { type: 'stage-chosen'; stageId: string }
  | { type: 'start-chosen'; startStage: boolean }
  | { type: 'audience-chosen'; audience: Audience }
  | { type: 'photos-chosen'; files: UploadFile[] }
  | { type: 'photo-removed'; uploadKey: string }
  | { type: 'photo-described'; uploadKey: string; alt: string }
  | { type: 'photo-moved'; uploadKey: string; upload: UploadState }
  | { type: 'post-asked' }
  | { type: 'post-taken-back' }
  | { type: 'send-began' }
  | { type: 'send-kept'; message: string; isSignedOut: boolean; mayHaveArrived: boolean }
  | { type: 'send-refused'; problem: Problem }
  | { type: 'posted'; entryId: string; isHeld: boolean };

export const KEPT_FOR_PHOTOS = 'Kept on this phone; it is sent when its photos are up.';

export function draftReducer(draft: Draft, event: DraftEvent): Draft {
  switch (event.type) {
    case 'photo-moved':
      return afterMove(draft, event.uploadKey, event.upload);
    case 'post-asked':
    case 'post-taken-back':
    case 'send-began':
    case 'send-kept':
    case 'send-refused':
    case 'posted':
      return { ...draft, posting: nextPosting(draft, event) };
    default:
      return draft.posting.step === 'writing' ? edited(draft, event) : draft;
  }
}

type Edit = Extract<DraftEvent, { type: `${string}-chosen` | 'written' | 'photo-removed' | 'photo-described' }>;

function edited(draft: Draft, event: Edit): Draft {
  switch (event.type) {
    case 'written':
      return { ...draft, note: event.note, posting: mended(draft, 'note') };
    case 'stage-chosen':
      return { ...draft, stageId: event.stageId, startStage: false, posting: mended(draft, 'stageId') };
    case 'start-chosen':
      return { ...draft, startStage: event.startStage };
    case 'audience-chosen':
      return { ...draft, audience: event.audience, posting: mended(draft, 'audience') };
    case 'photos-chosen':
      return { ...draft, photos: [...draft.photos, ...event.files.map(arrived)], posting: mended(draft, 'photos') };
    case 'photo-removed':
      return { ...draft, photos: without(draft.photos, event.uploadKey), posting: mended(draft, 'photos') };
    case 'photo-described':
      return { ...draft, photos: change(draft.photos, event.uploadKey, { alt: event.alt }) };
  }
}

const arrived = (file: UploadFile): BenchPhoto => ({ ...file, alt: '', upload: { step: 'queued' } });
const without = (photos: BenchPhoto[], uploadKey: string) => photos.filter((photo) => photo.uploadKey !== uploadKey);
const change = (photos: BenchPhoto[], uploadKey: string, over: Partial<BenchPhoto>) =>
  photos.map((photo) => (photo.uploadKey === uploadKey ? { ...photo, ...over } : photo));

/** What was said about a field goes once the field is touched; a draft without words needs a word or a photo. */
function mended({ posting }: Draft, field: ProblemField): Posting {
  if (posting.step !== 'writing' || !posting.problem) return posting;
  const fields = { ...posting.problem.fields, [field]: undefined };
  if (field === 'photos') fields.note = undefined;
  return { step: 'writing', problem: { fields } };
}

function afterMove(draft: Draft, uploadKey: string, upload: UploadState): Draft {
  const known = upload.step === 'ready' ? { upload, photoId: upload.photoId } : { upload };
  const photos = change(draft.photos, uploadKey, known);
  const isLost = upload.step === 'refused' || upload.step === 'failed';
  const mustWait = isLost && draft.posting.step === 'kept' && !draft.posting.wasSent;
  return { ...draft, photos, posting: mustWait ? { step: 'writing', problem: lostPhoto } : draft.posting };
}

const lostPhoto: Problem = {
  fields: { photos: 'Not every photo could be taken. Leave out what is marked, or try it again, then post.' },
};

type PostEvent = Exclude<DraftEvent, Edit | { type: 'photo-moved' }>;

function nextPosting({ posting }: Draft, event: PostEvent): Posting {
  const wasSent = 'wasSent' in posting && posting.wasSent;
  switch (event.type) {
    case 'post-asked':
      return posting.step === 'writing'
        ? { step: 'kept', message: KEPT_FOR_PHOTOS, isSignedOut: false, wasSent: false }
        : posting;
    case 'post-taken-back':
      return posting.step === 'kept' && !wasSent ? { step: 'writing' } : posting;
    case 'send-began':
      return { step: 'sending', wasSent };
    case 'send-kept':
      return {
        step: 'kept',
        message: event.message,
        isSignedOut: event.isSignedOut,
        wasSent: wasSent || event.mayHaveArrived,
      };
    case 'send-refused':
      return { step: 'writing', problem: event.problem };
    case 'posted':
      return { step: 'posted', entryId: event.entryId, isHeld: event.isHeld };
  }
}

/** What keeps an entry from being posted at all, before anybody is asked. */
export function problemOf({ note, photos }: Draft): Problem | null {
  if (photos.some(({ upload }) => upload.step === 'refused' || upload.step === 'failed')) return lostPhoto;
  const hasWords = note !== null && noteText(note).trim() !== '';
  if (hasWords || photos.length > 0) return null;
  return { fields: { note: 'There is nothing in it yet. Add a photo or write a line.' } };
}

export const isBlank = (draft: Draft) => draft.photos.length === 0 && problemOf(draft) !== null;

/** Where every photo lies in the shop, in order; null while one of them is not there yet. */
export function readyPhotos({ photos }: Draft): { id: string; alt: string }[] | null {
  const ready = photos.flatMap(({ upload, alt }) => (upload.step === 'ready' ? [{ id: upload.photoId, alt }] : []));
  return ready.length === photos.length ? ready : null;
}

export const readDraftNote = (note: unknown) => (note === null || note === undefined ? null : readNote(note));
