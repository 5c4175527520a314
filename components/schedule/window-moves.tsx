import { SectionHeading } from '@/components/ui/section-heading';
import { readySentence, type KeptWindow } from '@/lib/floor/said-window';
import { dateWords } from '@/lib/schedule/window-words';

type Given = KeptWindow & { givenOn: string; movedWhy: string | null };

/** Every time the window moved by more than a few days, newest first, down to the first that was given. */
export function WindowMoves({ moves, first, today }: { moves: readonly Given[]; first: Given | null; today: string }) {
  return (
    <section className="grid content-start gap-4">
      <SectionHeading>What we said before</SectionHeading>
      {moves.length === 0 && <p className="text-soft">It has not moved by more than a few days so far.</p>}
      <ol role="list" className="grid gap-4">
        {moves.map((move) => (
          <li key={move.givenOn}>
            <p className="narrow text-sm font-semibold text-soft">{dateWords(move.givenOn, today)}</p>
            <p className="font-semibold">{move.movedWhy}</p>
            <p>{readySentence(move, today)}</p>
          </li>
        ))}
        {first && (
          <li>
            <p className="narrow text-sm font-semibold text-soft">{dateWords(first.givenOn, today)}, the first</p>
            <p>{readySentence(first, today)}</p>
          </li>
        )}
      </ol>
    </section>
  );
}
