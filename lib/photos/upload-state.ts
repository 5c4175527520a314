/** How one photo of a draft stands on its way to the shop. */
export type UploadState =
  | { step: 'queued' }
  | { step: 'measuring' }
  | { step: 'asking' }
  /** `share` is what has been sent, from 0 to 1. */
  | { step: 'sending'; share: number }
  | { step: 'checking' }
  /** Nothing can be done just now; it is tried again by itself. */
  | { step: 'waiting'; message: string }
  | { step: 'ready'; photoId: string }
  /** Looked at and not taken: sending it again would not help. */
  | { step: 'refused'; message: string }
  /** Given up after some tries; a person may try again. */
  | { step: 'failed'; message: string };

const goingUp: readonly UploadState['step'][] = ['queued', 'measuring', 'asking', 'sending', 'checking'];

export const isGoingUp = ({ step }: UploadState) => goingUp.includes(step);

/** What a progress bar shows, from 0 to 1; sending takes up most of it, the shop's own check the rest. */
export function shareDone(upload: UploadState): number {
  if (upload.step === 'sending') return 0.05 + upload.share * 0.85;
  if (upload.step === 'checking') return 0.95;
  return upload.step === 'ready' ? 1 : 0;
}

/** One line about a photo, for its row and for a screen reader. */
export function uploadWords(upload: UploadState): string {
  switch (upload.step) {
    case 'queued':
      return 'Waits for its turn';
    case 'measuring':
    case 'asking':
      return 'Getting ready';
    case 'sending':
      return `Going up, ${Math.round(upload.share * 100)} %`;
    case 'checking':
      return 'The shop looks at it';
    case 'ready':
      return 'Uploaded';
    case 'waiting':
    case 'refused':
    case 'failed':
      return upload.message;
  }
}
