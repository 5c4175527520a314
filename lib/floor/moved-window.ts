import { closuresWithin, type GivenWindow } from './forecast';
import type { KeptGrounds } from './grounds';
import type { WorkingCalendar } from '../schedule/calendar';
import { moved, whyMoved, type Grounds } from '../schedule/window-moves';

/** The window that a build's owner knows: the last one that they were told of, or the first that was given. */
export type KnownWindow = {
  earliestOn: string | null;
  likelyOn: string | null;
  latestOn: string | null;
  grounds: KeptGrounds | null;
};

function datesOf({ earliestOn, likelyOn, latestOn }: Pick<KnownWindow, 'earliestOn' | 'likelyOn' | 'latestOn'>) {
  return earliestOn !== null && likelyOn !== null && latestOn !== null ? { earliestOn, likelyOn, latestOn } : null;
}

const namesOf = (closures: KeptGrounds['closures']) => closures.map(({ name }) => name);

/**
 * Two grounds made comparable: of the old one's days off those that are still ahead, of the calendar's those within the
 * old window. Days off that have passed, or that a later window takes in by itself, are no reason.
 */
function comparable(
  known: KeptGrounds,
  knownLatestOn: string,
  given: GivenWindow,
  calendar: WorkingCalendar,
  today: string,
) {
  const before: Grounds = { ...known, closures: namesOf(known.closures.filter(({ endsOn }) => endsOn >= today)) };
  const after: Grounds = { ...given.grounds, closures: namesOf(closuresWithin(calendar, today, knownLatestOn)) };
  return { before, after };
}

const asSentence = (words: string) => `${words.charAt(0).toUpperCase()}${words.slice(1)}.`;

/**
 * Why a window moved against the one its owner knows, in a sentence; null when it did not move by more than a few working
 * days. What the shop wrote about a move back is not in it: that is for the next hands.
 */
export function movedWhy(
  known: KnownWindow,
  given: GivenWindow,
  calendar: WorkingCalendar,
  today: string,
): string | null {
  if (known.grounds === null) return null;
  const { window } = given;
  const move = moved(calendar, datesOf(known), window.kind === 'unsayable' ? null : window);
  if (!move.isToTell) return null;
  const { before, after } = comparable(known.grounds, known.latestOn ?? today, given, calendar, today);
  const why = whyMoved(move, before, after);
  return why === null ? null : asSentence(why);
}
