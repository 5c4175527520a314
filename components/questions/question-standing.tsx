import type { QuestionRow } from '@/db/queries/question-lists';
import { dayWords } from '@/lib/date-words';
import { dueWords, whenWords } from '@/lib/questions/due-words';
import { waitWords } from '@/lib/questions/wait-words';

/** What a list of questions needs to know of its reader. */
export type ListReader = { id: string; isStaff: boolean; zone: string; nowMs: number };

export type Standing = Pick<
  QuestionRow,
  'state' | 'waitingSince' | 'lastLetterAt' | 'penHolderId' | 'penHolderName' | 'dueAt' | 'closedAt' | 'closedHow'
>;

/** Where a question stands. What waits on the reader is set in brass, what is late says so; to a client it waits on the shop. */
export function StandingWords({ question, reader }: { question: Standing; reader: ListReader }) {
  if (question.state === 'closed')
    return (
      <span className="text-soft">{question.closedHow === 'no_answer_needed' ? 'No answer needed' : 'Closed'}</span>
    );
  if (question.state === 'answered') return <span className="text-soft">Answered</span>;
  if (!reader.isStaff) return <span className="font-semibold">With the shop</span>;
  const isMine = question.penHolderId === reader.id;
  const due = question.dueAt === null ? null : dueWords(question.dueAt, reader.zone, reader.nowMs);
  if (due?.isLate) return <span className="font-semibold text-late">{due.short}</span>;
  return (
    <span className={isMine ? 'font-semibold text-brass-deep' : 'font-semibold'}>
      {due?.short ?? (isMine ? 'Waits on you' : 'Waiting')}
    </span>
  );
}

/** "answer was due Monday 13:12" to the shop, "answer by Monday 13:12" to the client; "on 9 November" when it is over. */
export function sinceWords(standing: Standing, { isStaff, zone, nowMs }: ListReader): string {
  const { state, waitingSince, lastLetterAt, dueAt, closedAt } = standing;
  if (state !== 'waiting') return `on ${dayWords(closedAt ?? lastLetterAt, zone, nowMs)}`;
  if (dueAt !== null && isStaff) return dueWords(dueAt, zone, nowMs).long;
  if (dueAt !== null && dueAt > nowMs) return `answer by ${whenWords(dueAt, zone, nowMs)}`;
  return `for ${waitWords(waitingSince, nowMs)}`;
}

export function penWords({ penHolderId, penHolderName }: Standing, reader: ListReader): string {
  return penHolderId === reader.id ? 'you' : (penHolderName ?? 'nobody yet');
}
