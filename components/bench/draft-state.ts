import { mended, nextPosting, type Posting, type PostingEvent, type Problem } from './posting-state';
import type { UploadFile } from '@/lib/photos/upload-walk';
import type { UploadState } from '@/lib/photos/upload-state';
import type { KeptReadings } from '@/lib/drafts';
import type { ReadingStand } from '@/lib/readings/read-typed';
import { isBlankTyped, type TypedReadings } from '@/lib/readings/typed';
import { noteText } from '@/lib/rich-text/plain-text';
import { readNote } from '@/lib/rich-text/read';
import type { NoteDoc } from '@/lib/rich-text/doc';

export type BenchPhoto = UploadFile & { alt: string; upload: UploadState };
export type Audience = 'buyer' | 'shop';

export type Draft = {
  idempotencyKey: string;
  note: NoteDoc | null;
  stageId: string | null;
  startStage: boolean;
  audience: Audience;
  photos: BenchPhoto[];
  readings: KeptReadings;
  /** Keys of the spec items that the entry is to show. */
  proves: string[];
  posting: Posting;
};

export type DraftEvent =
  | { type: 'written'; note: NoteDoc }
  | { type: 'stage-chosen'; stageId: string }
  | { type: 'start-chosen'; startStage: boolean }
  | { type: 'audience-chosen'; audience: Audience }
  | { type: 'reading-typed'; typed: TypedReadings; stand: ReadingStand }
  | { type: 'proof-marked'; itemKey: string; isShown: boolean }
  | { type: 'photos-chosen'; files: UploadFile[] }
  | { type: 'photo-removed'; uploadKey: string }
  | { type: 'photo-described'; uploadKey: string; alt: string }
  | { type: 'photo-moved'; uploadKey: string; upload: UploadState }
  | PostingEvent;

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
      return { ...draft, posting: nextPosting(draft.posting, event) };
    default:
      return draft.posting.step === 'writing' ? edited(draft, event) : draft;
  }
}

type Edit = Extract<
  DraftEvent,
  { type: `${string}-chosen` | 'written' | 'photo-removed' | 'photo-described' | 'reading-typed' | 'proof-marked' }
>;

function edited(draft: Draft, event: Edit): Draft {
  switch (event.type) {
    case 'written':
      return { ...draft, note: event.note, posting: mended(draft.posting, 'note') };
    case 'stage-chosen':
      return movedTo(draft, event.stageId);
    case 'start-chosen':
      return { ...draft, startStage: event.startStage };
    case 'audience-chosen':
      return { ...draft, audience: event.audience, posting: mended(draft.posting, 'audience') };
    case 'reading-typed':
      return {
        ...draft,
        stageId: event.stand.stageId,
        readings: { typed: event.typed, stand: event.stand },
        posting: mended(draft.posting, 'readings'),
      };
    case 'proof-marked':
      return { ...draft, proves: marked(draft.proves, event), posting: mended(draft.posting, 'proves') };
    case 'photos-chosen':
      return {
        ...draft,
        photos: [...draft.photos, ...event.files.map(arrived)],
        posting: mended(draft.posting, 'photos'),
      };
    case 'photo-removed':
      return { ...draft, photos: without(draft.photos, event.uploadKey), posting: mended(draft.posting, 'photos') };
    case 'photo-described':
      return { ...draft, photos: change(draft.photos, event.uploadKey, { alt: event.alt }) };
  }
}

/** What was typed stays, and is read anew for the stage it now belongs to. */
function movedTo(draft: Draft, stageId: string): Draft {
  const readings = { ...draft.readings, stand: null };
  return { ...draft, stageId, startStage: false, readings, posting: mended(draft.posting, 'stageId') };
}

const marked = (proves: string[], { itemKey, isShown }: { itemKey: string; isShown: boolean }) => [
  ...proves.filter((key) => key !== itemKey),
  ...(isShown ? [itemKey] : []),
];

const arrived = (file: UploadFile): BenchPhoto => ({ ...file, alt: '', upload: { step: 'queued' } });
const without = (photos: BenchPhoto[], uploadKey: string) => photos.filter((photo) => photo.uploadKey !== uploadKey);
const change = (photos: BenchPhoto[], uploadKey: string, over: Partial<BenchPhoto>) =>
  photos.map((photo) => (photo.uploadKey === uploadKey ? { ...photo, ...over } : photo));

function afterMove(draft: Draft, uploadKey: string, upload: UploadState): Draft {
  const known = upload.step === 'ready' ? { upload, photoId: upload.photoId } : { upload };
  const photos = change(draft.photos, uploadKey, known);
  const isLost = upload.step === 'refused' || upload.step === 'failed';
  const mustWait = isLost && draft.posting.step === 'kept' && !draft.posting.wasSent;
  return { ...draft, photos, posting: mustWait ? { step: 'writing', problem: lostPhoto() } : draft.posting };
}

const lostPhoto = (): Problem => ({
  fields: { photos: 'Not every photo could be taken. Leave out what is marked, or try it again, then post.' },
});

const UNREAD = 'The readings have not been read for this stage yet. Open them once more, then post.';

/** What keeps an entry from being posted at all, before anybody is asked. */
export function problemOf({ note, photos, readings }: Draft): Problem | null {
  if (photos.some(({ upload }) => upload.step === 'refused' || upload.step === 'failed')) return lostPhoto();
  const { typed, stand } = readings;
  if (stand === null && !isBlankTyped(typed)) return { fields: { readings: UNREAD } };
  if (stand?.isRefused)
    return { fields: { readings: 'Look at the readings again: something in them is missing or cannot be meant.' } };
  const hasWords = note !== null && noteText(note).trim() !== '';
  if (hasWords || photos.length > 0 || (stand && stand.readings.length > 0)) return null;
  return { fields: { note: 'There is nothing in it yet. Add a photo or a reading, or write a line.' } };
}

export const isBlank = (draft: Draft) =>
  draft.photos.length === 0 && isBlankTyped(draft.readings.typed) && problemOf(draft) !== null;

/** Where every photo lies in the shop, in order; null while one of them is not there yet. */
export function readyPhotos({ photos }: Draft): { id: string; alt: string }[] | null {
  const ready = photos.flatMap(({ upload, alt }) => (upload.step === 'ready' ? [{ id: upload.photoId, alt }] : []));
  return ready.length === photos.length ? ready : null;
}

export const readDraftNote = (note: unknown) => (note === null || note === undefined ? null : readNote(note));
