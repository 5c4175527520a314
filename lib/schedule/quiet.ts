import { daysBetween } from './days';
import { dateWords } from './window-words';

export type QuietInput = {
  /** When the owner last saw something new; the day the build was begun, when nothing was ever shown. YYYY-MM-DD */
  readonly lastNewsOn: string;
  /** The longest silence its stage allows, in calendar days. */
  readonly longestSilenceDays: number;
  readonly today: string;
};

/** 0 within what its stage allows, 1 over it (the holder of the stage hears of it), 2 over twice that (the rep does). */
export type QuietLevel = 0 | 1 | 2;

export type Quiet = { level: QuietLevel; silentDays: number };

/** @throws RangeError for a silence that is not at least one day, or a bad date */
export function quietOf({ lastNewsOn, longestSilenceDays, today }: QuietInput): Quiet {
  if (!(longestSilenceDays >= 1))
    throw new RangeError(`A stage allows at least one day of silence, not ${longestSilenceDays}.`);
  // A clock that runs ahead writes tomorrow's date.
  const silentDays = Math.max(0, daysBetween(lastNewsOn, today));
  if (silentDays <= longestSilenceDays) return { level: 0, silentDays };
  return { level: silentDays <= 2 * longestSilenceDays ? 1 : 2, silentDays };
}

/** What a stage does to a build while there is nothing to show. */
export type StageRest = 'rests' | 'cures' | 'is worked on';

export type WaitingFor = {
  /** Where it is, with its article: "the wood room". */
  readonly place: string;
  readonly rest: StageRest;
  /** When that is likely over, YYYY-MM-DD; null when nothing can be said. */
  readonly untilOn: string | null;
  /** What the owner must sign off, with its article; null when nothing waits. */
  readonly waitingOn: string | null;
};

/** What the player reads instead of silence: "It rests in the wood room until about 12 August, nothing to photograph until then." */
export function waitingWords({ place, rest, untilOn, waitingOn }: WaitingFor, today: string): string {
  if (waitingOn !== null) return `It waits in ${place} for you to sign off ${waitingOn}.`;
  // A date that has come says nothing any more.
  const until = untilOn !== null && untilOn > today ? ` until about ${dateWords(untilOn, today)}` : '';
  if (rest === 'is worked on') return `It is being worked on in ${place}${until}.`;
  return `It ${rest} in ${place}${until}, nothing to photograph ${until === '' ? 'for now' : 'until then'}.`;
}
