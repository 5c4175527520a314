export type ProblemField = 'note' | 'photos' | 'stageId' | 'audience' | 'readings' | 'proves';

export type Problem = {
  message?: string;
  fields: Partial<Record<ProblemField, string>>;
  /** Something has been changed since it was said. */
  isTouched?: boolean;
};

/** How far the entry itself is. Only while it is being written may anything in it change. */
export type Posting =
  | { step: 'writing'; problem?: Problem }
  /** To be posted as soon as that can be done; `wasSent`: a try went unanswered and may have arrived. */
  | { step: 'kept'; message: string; isSignedOut: boolean; wasSent: boolean }
  | { step: 'sending'; wasSent: boolean }
  | { step: 'posted'; entryId: string; isHeld: boolean };

export type PostingEvent =
  | { type: 'post-asked' }
  | { type: 'post-taken-back' }
  | { type: 'send-began' }
  | { type: 'send-kept'; message: string; isSignedOut: boolean; mayHaveArrived: boolean }
  | { type: 'send-refused'; problem: Problem }
  | { type: 'posted'; entryId: string; isHeld: boolean };

export const KEPT_FOR_PHOTOS = 'Kept on this phone; it is sent when its photos are up.';

export function nextPosting(posting: Posting, event: PostingEvent): Posting {
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

/** What was said about a field goes once the field is touched; a draft without words needs a word or a photo. */
export function mended(posting: Posting, field: ProblemField): Posting {
  if (posting.step !== 'writing' || !posting.problem) return posting;
  const fields = { ...posting.problem.fields, [field]: undefined };
  if (field === 'photos' || field === 'readings') fields.note = undefined;
  return { step: 'writing', problem: { fields, isTouched: true } };
}
