import type { Audience, Draft } from './draft-state';
import type { PostingEvent, Problem, ProblemField } from './posting-state';
import { provenAt } from './proof-choice';
import { stageOf, type StageChoice } from './stage-choice';
import type { NoteDoc } from '@/lib/rich-text/doc';
import { callShop, isPassing, type Answer } from '@/lib/photos/upload-answer';
import type { BenchItem } from '@/lib/readings/plan';
import type { NewReading } from '@/lib/readings/reading';
import { plainNote } from '@/lib/rich-text/plain-text';

export type EntryToPost = {
  orderNumber: string;
  idempotencyKey: string;
  stageId: string;
  startStage: boolean;
  audience: Audience;
  note: NoteDoc;
  photos: { id: string; alt: string }[];
  readings: NewReading[];
  proves: string[];
};

type Posted = { id: string; state: 'held' | 'published' | 'withdrawn' };

export const NO_SIGNAL = 'No signal. Kept on this phone; it is sent when you are back in range.';
const BUSY = 'The shop does not answer just now. Kept on this phone; it is sent as soon as it does.';
const SIGNED_OUT = 'You are signed out. The entry is kept on this phone; sign in again and it is sent.';
const NOT_YOURS =
  'You can no longer post to this build. Your words are kept on this phone until you discard them; ask a rep or the admin.';

/** Posts an entry. Sent twice with the same idempotency key it is in the diary once. */
export async function postEntry(entry: EntryToPost): Promise<PostingEvent> {
  return eventOf(await callShop<Posted>({ method: 'POST', url: '/api/entries', body: entry }));
}

/** What an answer of the diary means for the draft. */
export function eventOf(answer: Answer<Posted>): PostingEvent {
  if (answer.kind === 'ok') return { type: 'posted', entryId: answer.body.id, isHeld: answer.body.state === 'held' };
  if (answer.kind === 'no-signal') return kept(NO_SIGNAL, { mayHaveArrived: true });
  const { status, message, fields } = answer;
  if (status === 401) return kept(SIGNED_OUT, { isSignedOut: true });
  if (status === 429) return kept(message ?? BUSY, {});
  if (isPassing(status)) return kept(BUSY, { mayHaveArrived: true });
  if (status === 404) return { type: 'send-refused', problem: { message: NOT_YOURS, fields: {} } };
  return { type: 'send-refused', problem: problemFrom(message, fields ?? {}) };
}

function kept(message: string, over: { isSignedOut?: boolean; mayHaveArrived?: boolean }): PostingEvent {
  return { type: 'send-kept', message, isSignedOut: false, mayHaveArrived: false, ...over };
}

const shown: readonly ProblemField[] = ['note', 'photos', 'stageId', 'audience', 'readings', 'proves'];

/** Sentences go to the fields they belong to; one without a field on this page stands by the button. */
function problemFrom(message: string | undefined, sentences: Record<string, string>): Problem {
  const problem: Problem = { message, fields: {} };
  for (const [path, sentence] of Object.entries(sentences)) {
    const field = shown.find((name) => path === name || path.startsWith(`${name}.`));
    if (field) problem.fields[field] ??= sentence;
    else problem.message = sentence;
  }
  return problem;
}

type Parts = {
  draft: Draft;
  orderNumber: string;
  stages: StageChoice[];
  items: BenchItem[];
  photos: EntryToPost['photos'];
};

/** Readings and ticks that belong to another stage stay on the phone. */
export function entryFrom({ draft, orderNumber, stages, items, photos }: Parts): EntryToPost {
  const { idempotencyKey, startStage, audience, note } = draft;
  const stageId = stageOf(stages, draft.stageId);
  const { stand } = draft.readings;
  return {
    orderNumber,
    idempotencyKey,
    stageId,
    startStage,
    audience,
    note: note ?? plainNote(''),
    photos,
    readings: stand?.stageId === stageId ? stand.readings : [],
    proves: provenAt(items, stages, stageId).flatMap(({ key }) => (draft.proves.includes(key) ? [key] : [])),
  };
}
