import Link from 'next/link';
import { readySentence, type KeptWindow } from '@/lib/floor/said-window';
import { daysBetween } from '@/lib/schedule/days';
import { dateWords } from '@/lib/schedule/window-words';

/** A change is news for so long; afterwards it is on the page of the window. */
const NEWS_DAYS = 14;

type ReadyLineProps = {
  orderNumber: string;
  window: (KeptWindow & { lastMove: { givenOn: string; movedWhy: string | null } | null }) | null;
  /** What its stage waits for, where there is little to show. */
  stageWords: string | null;
  /** The shop's date. */
  today: string;
};

/** A build's ready window in words, why it moved last, and what its stage is about. */
export function ReadyLine({ orderNumber, window, stageWords, today }: ReadyLineProps) {
  if (!window && !stageWords) return null;
  const move = window?.lastMove && daysBetween(window.lastMove.givenOn, today) <= NEWS_DAYS ? window.lastMove : null;
  return (
    <div className="mt-3 grid max-w-3xl gap-1">
      {window && (
        <p>
          <span className="font-semibold">{readySentence(window, today)}</span>{' '}
          <Link href={`/builds/${orderNumber}/window`} className="text-finish-deep underline underline-offset-4">
            How we know
          </Link>
        </p>
      )}
      {move?.movedWhy && (
        <p className="text-soft">
          Changed on {dateWords(move.givenOn, today)}. {move.movedWhy}
        </p>
      )}
      {stageWords && window?.kind !== 'waiting' && <p className="text-soft">{stageWords}</p>}
    </div>
  );
}
