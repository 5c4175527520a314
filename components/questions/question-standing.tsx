import type { QuestionRow } from '@/db/queries/question-lists';
import { dayWords } from '@/lib/date-words';
import { waitWords } from '@/lib/questions/wait-words';

/** What a list of questions needs to know of its reader. */
export type ListReader = { id: string; isStaff: boolean; zone: string; nowMs: number };

export type Standing = Pick<QuestionRow, 'state' | 'waitingSince' | 'lastLetterAt' | 'penHolderId' | 'penHolderName'>;

/** Where a question stands. What waits on the reader is set in brass; to a client it waits on the shop. */
export function StandingWords({ question, reader }: { question: Standing; reader: ListReader }) {
  if (question.state === 'answered') return <span className="text-soft">Answered</span>;
  if (!reader.isStaff) return <span className="font-semibold">With the shop</span>;
  const isMine = question.penHolderId === reader.id;
  return (
    <span className={isMine ? 'font-semibold text-brass-deep' : 'font-semibold'}>
      {isMine ? 'Waits on you' : 'Waiting'}
    </span>
  );
}

/** "for 3 hours" while it waits, "on 9 November" when it is answered. */
export function sinceWords({ state, waitingSince, lastLetterAt }: Standing, { zone, nowMs }: ListReader): string {
  return state === 'waiting' ? `for ${waitWords(waitingSince, nowMs)}` : `on ${dayWords(lastLetterAt, zone, nowMs)}`;
}

export function penWords({ penHolderId, penHolderName }: Standing, reader: ListReader): string {
  return penHolderId === reader.id ? 'you' : (penHolderName ?? 'nobody yet');
}
