import { MarginFold } from './margin-fold';
import { MarginForm } from './margin-form';
import { NoteText } from '@/components/rich-text/note-text';
import type { MarginRow } from '@/db/queries/margin';
import type { PenPassRow } from '@/db/queries/pen';
import { clockWords, dayWords } from '@/lib/date-words';
import { partWords } from '@/lib/questions/people-words';
import type { ListReader } from './question-standing';

type ShopMarginProps = { questionId: string; notes: MarginRow[]; passes: PenPassRow[]; reader: ListReader };

type Line = { id: string; atMs: number; note: MarginRow | null; pass: PenPassRow | null };

/** Notes and hand-overs as they came. */
function linesOf(notes: MarginRow[], passes: PenPassRow[]): Line[] {
  return [
    ...notes.map((note) => ({ id: note.id, atMs: note.writtenAt, note, pass: null })),
    ...passes.map((pass) => ({ id: pass.id, atMs: pass.passedAt, note: null, pass })),
  ].sort((one, other) => one.atMs - other.atMs);
}

/** What stands beside a question for the shop only: behind a dashed rule, in italics. Never rendered for the client side. */
export function ShopMargin({ questionId, notes, passes, reader }: ShopMarginProps) {
  return (
    <aside
      aria-label="Shop margin"
      className="border-t border-dashed border-edge px-4.5 py-6 md:px-10 lg:border-t-0 lg:border-l lg:px-8 lg:py-9 print:hidden"
    >
      <MarginFold count={notes.length}>
        <p className="text-sm text-soft">Only people on this build at the shop read what is written here.</p>
        {notes.length + passes.length > 0 && (
          <ol role="list" className="mt-6 grid gap-6">
            {linesOf(notes, passes).map(({ id, note, pass }) => (
              <li key={id}>
                {note && <Note note={note} reader={reader} />}
                {pass && <Pass pass={pass} reader={reader} />}
              </li>
            ))}
          </ol>
        )}
        <MarginForm questionId={questionId} viewerId={reader.id} />
      </MarginFold>
    </aside>
  );
}

function whenOf(ms: number, { zone, nowMs }: ListReader): string {
  const day = dayWords(ms, zone, nowMs);
  return day === dayWords(nowMs, zone, nowMs) ? clockWords(ms, zone) : `${day}, ${clockWords(ms, zone)}`;
}

function Note({ note, reader }: { note: MarginRow; reader: ListReader }) {
  return (
    <>
      <NoteText doc={note.body} className="italic" />
      <p className="mt-0.5 text-sm text-soft">
        <bdi>{note.author}</bdi>
        {note.role === 'builder' && `, ${partWords(note)}`} · {whenOf(note.writtenAt, reader)}
      </p>
    </>
  );
}

function Pass({ pass, reader }: { pass: PenPassRow; reader: ListReader }) {
  const to = pass.to ?? 'nobody';
  const words = pass.by ? `${pass.by} passed the pen to ${to}: ` : `The pen went to ${to}. `;
  return (
    <p className="text-sm text-soft">
      <bdi>{words}</bdi>
      <bdi>{pass.by ? `“${pass.reason}”` : pass.reason}</bdi> · {whenOf(pass.passedAt, reader)}
    </p>
  );
}
