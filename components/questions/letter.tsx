import { FreshLetter } from './fresh-letter';
import { LetterPrints } from './letter-prints';
import { NoteText } from '@/components/rich-text/note-text';
import { Avatar } from '@/components/ui/avatar';
import type { LetterRow } from '@/db/queries/questions';
import { clockWords, dayWords, marginDate } from '@/lib/date-words';
import { partWords } from '@/lib/questions/people-words';

type LetterProps = {
  letter: LetterRow;
  questionId: string;
  viewerId: string;
  zone: string;
  nowMs: number;
  /** Who of the other side has seen it; told under the newest letter only. */
  readBy: { name: string; readAt: number }[];
};

/** One letter, set as an entry of the diary is: its date in the margin, its text to be read. */
export function Letter({ letter, questionId, viewerId, zone, nowMs, readBy }: LetterProps) {
  const isOwn = letter.authorId === viewerId;
  const { correctableUntilAt } = letter;
  return (
    <li className="grid gap-x-9 pb-9 md:grid-cols-[5.75rem_minmax(0,44rem)]">
      <Written atMs={letter.writtenAt} zone={zone} nowMs={nowMs} />
      <article className="grid min-w-0 content-start gap-3">
        <p className="flex items-center gap-2.5">
          <Avatar name={letter.author} />
          <span>
            <bdi className="font-semibold">{letter.author}</bdi>
            <span className="text-soft">, {isOwn ? 'you' : partWords(letter)}</span>
            {letter.arrivedBy === 'mail' && <span className="text-soft"> · by mail</span>}
            {letter.correctedAt !== null && (
              <span className="text-soft"> · corrected {clockWords(letter.correctedAt, zone)}</span>
            )}
          </span>
        </p>
        <NoteText doc={letter.body} />
        <LetterPrints photos={letter.photos} />
        {isOwn && correctableUntilAt !== null && correctableUntilAt > nowMs && (
          <FreshLetter
            questionId={questionId}
            letterId={letter.id}
            body={letter.body}
            untilMs={correctableUntilAt}
            clock={clockWords(correctableUntilAt, zone)}
          />
        )}
        <ReadBy readBy={readBy} zone={zone} nowMs={nowMs} />
      </article>
    </li>
  );
}

function ReadBy({ readBy, zone, nowMs }: Pick<LetterProps, 'readBy' | 'zone' | 'nowMs'>) {
  if (readBy.length === 0) return null;
  const words = readBy.map(({ name, readAt }) => `${name} ${momentWords(readAt, zone, nowMs)}`);
  return (
    <p className="text-sm text-soft">
      Read by <bdi>{words.join(', ')}</bdi>
    </p>
  );
}

/** The clock for today, the day as well for earlier. */
function momentWords(ms: number, zone: string, nowMs: number): string {
  const day = dayWords(ms, zone, nowMs);
  return day === dayWords(nowMs, zone, nowMs) ? clockWords(ms, zone) : `${day}, ${clockWords(ms, zone)}`;
}

function Written({ atMs, zone, nowMs }: { atMs: number; zone: string; nowMs: number }) {
  const { day, month } = marginDate(atMs, zone);
  const clock = clockWords(atMs, zone);
  return (
    <p className="pb-2 text-sm text-soft md:pb-0 md:text-right">
      <time dateTime={new Date(atMs).toISOString()}>
        <span className="md:hidden">
          {dayWords(atMs, zone, nowMs)}, {clock}
        </span>
        <span className="hidden md:block">
          <span className="narrow block text-3xl leading-8 font-semibold text-ink">{day}</span>
          <span className="block">{month}</span>
          <span className="block">{clock}</span>
        </span>
      </time>
    </p>
  );
}
