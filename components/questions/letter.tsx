import { NoteText } from '@/components/rich-text/note-text';
import { Avatar } from '@/components/ui/avatar';
import type { LetterRow } from '@/db/queries/questions';
import { clockWords, dayWords, marginDate } from '@/lib/date-words';
import { partWords } from '@/lib/questions/people-words';

type LetterProps = { letter: LetterRow; viewerId: string; zone: string; nowMs: number };

/** One letter, set as an entry of the diary is: its date in the margin, its text to be read. */
export function Letter({ letter, viewerId, zone, nowMs }: LetterProps) {
  return (
    <li className="grid gap-x-9 pb-9 md:grid-cols-[5.75rem_minmax(0,44rem)]">
      <Written atMs={letter.writtenAt} zone={zone} nowMs={nowMs} />
      <article className="grid content-start gap-3">
        <p className="flex items-center gap-2.5">
          <Avatar name={letter.author} />
          <span>
            <bdi className="font-semibold">{letter.author}</bdi>
            <span className="text-soft">, {letter.authorId === viewerId ? 'you' : partWords(letter)}</span>
          </span>
        </p>
        <NoteText doc={letter.body} />
      </article>
    </li>
  );
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
