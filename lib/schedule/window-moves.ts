import { countWorkingDays, type WorkingCalendar } from './calendar';

/** The dates of a window as it was given, or null when nothing could be said. */
export type GivenWindow = { earliestOn: string; likelyOn: string; latestOn: string } | null;

export type Move = {
  kind: 'same' | 'later' | 'sooner' | 'lost' | 'found';
  /** Working days by which the likely date moved, or the latest where that moved further; 0 unless later or sooner. */
  days: number;
  /** Whether the owner should hear of it before they ask. */
  isToTell: boolean;
};

/** A window breathes by a day or two as its stage goes on; more than this is news. */
const FEW_DAYS = 3;

/**
 * How a window moved. Compare with the window that the owner was last told, not with yesterday's, or ten small moves go
 * unsaid.
 */
export function moved(calendar: WorkingCalendar, previous: GivenWindow, next: GivenWindow): Move {
  if (previous === null || next === null) {
    if (previous === next) return { kind: 'same', days: 0, isToTell: false };
    return { kind: next === null ? 'lost' : 'found', days: 0, isToTell: true };
  }
  const likely = countWorkingDays(calendar, previous.likelyOn, next.likelyOn);
  const latest = countWorkingDays(calendar, previous.latestOn, next.latestOn);
  const days = Math.abs(latest) > Math.abs(likely) ? latest : likely;
  if (days === 0) return { kind: 'same', days, isToTell: false };
  return { kind: days > 0 ? 'later' : 'sooner', days: Math.abs(days), isToTell: Math.abs(days) > FEW_DAYS };
}

/** What the forecast of a day rested on; kept with each window so that the next can be explained. */
export type Grounds = {
  /** As it stands in a sentence, with its article where it has one: "the wood room", "neck & board". */
  readonly stageName: string;
  readonly stagePosition: number;
  readonly routeName: string;
  /** Working days spent in the stage, and the most that is usual there. */
  readonly spentDays: number;
  readonly usualDays: number;
  readonly waitingOn: string | null;
  readonly closures: readonly string[];
  readonly isAdjusted: boolean;
};

const inSentence = (name: string) => name.charAt(0).toLowerCase() + name.slice(1);

function closureReason(before: Grounds, after: Grounds, isLater: boolean): string | null {
  const [fewer, more] = isLater ? [before, after] : [after, before];
  const name = more.closures.find((each) => !fewer.closures.includes(each));
  if (name === undefined) return null;
  return isLater ? `the shop will be closed for ${name}` : `the shop will not close for ${name} after all`;
}

/** An answer only ever comes late: nothing is promised before it. */
function waitReason(before: Grounds, after: Grounds, isLater: boolean): string | null {
  if (!isLater) return null;
  if (after.waitingOn !== null) return `it waits for ${after.waitingOn} to be signed off`;
  return before.waitingOn === null ? null : `it waited for ${before.waitingOn} to be signed off`;
}

function stageReason(before: Grounds, after: Grounds, isLater: boolean): string | null {
  const stage = inSentence(after.stageName);
  if (after.stagePosition < before.stagePosition) return `it went back to ${stage}`;
  const left = inSentence(before.stageName);
  if (after.stagePosition > before.stagePosition) {
    return isLater ? `${left} took longer than it usually does` : `${left} went faster than it usually does`;
  }
  return isLater && after.spentDays > after.usualDays ? `${stage} is taking longer than it usually does` : null;
}

function reasonOf(before: Grounds, after: Grounds, isLater: boolean): string {
  if (after.routeName !== before.routeName) return `it now takes the route ${after.routeName}`;
  const wentBack = after.stagePosition < before.stagePosition ? stageReason(before, after, isLater) : null;
  const found =
    wentBack ??
    waitReason(before, after, isLater) ??
    closureReason(before, after, isLater) ??
    stageReason(before, after, isLater);
  if (found !== null) return found;
  if (after.isAdjusted !== before.isAdjusted) return 'we give our windows a different width now, by how past ones held';
  return `recent builds took ${isLater ? 'longer' : 'less time'} in the stages ahead`;
}

const NUMBERS = [
  'no',
  'one',
  'two',
  'three',
  'four',
  'five',
  'six',
  'seven',
  'eight',
  'nine',
  'ten',
  'eleven',
  'twelve',
];
const daysWords = (days: number) => `${NUMBERS[days] ?? days} working ${days === 1 ? 'day' : 'days'}`;

/**
 * One sentence: "two working days later: it went back to the wood room". Null when the window did not move.
 * `note` is what the shop wrote about it ("the neck went back to the wood room") and goes before every other reason.
 */
export function whyMoved(move: Move, before: Grounds, after: Grounds, note: string | null = null): string | null {
  if (move.kind === 'same') return null;
  if (move.kind === 'lost')
    return `no date for now: ${note ?? `${inSentence(after.stageName)} is taking longer than ever before`}`;
  if (move.kind === 'found') return `there is a date again: ${note ?? `it is in ${inSentence(after.stageName)} now`}`;
  const reason = note ?? reasonOf(before, after, move.kind === 'later');
  return `${daysWords(move.days)} ${move.kind}: ${reason}`;
}
