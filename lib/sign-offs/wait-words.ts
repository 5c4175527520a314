import { calendarDayWords, type SignOffState } from './state-words';

export type Waiting = {
  title: string;
  dueOn: string;
  state: SignOffState;
  /** The stage that cannot start before, by name. */
  blocks: string | null;
  /** Null for the owner, who is "you". */
  ownerName: string | null;
};

/** Who waits for whom, for the diary and the floor: "Waits for you: sign Headstock logo by 12 December". */
export function waitWords({ title, dueOn, state, ownerName }: Waiting, today: string, nowMs: number): string {
  const day = calendarDayWords(dueOn, nowMs);
  const isLate = state === 'asked' && dueOn < today;
  const by = isLate ? `, due since ${day}` : ` by ${day}`;
  if (ownerName === null)
    return state === 'asked'
      ? `Waits for you: sign “${title}”${by}`
      : `Waits for the shop: you asked for a change to “${title}”`;
  return state === 'asked'
    ? `Waits for ${ownerName}’s signature on “${title}”${by}`
    : `Waits for us: ${ownerName} asked for a change to “${title}”`;
}

/** The stage that cannot start before, or null when none waits. */
export const blockWords = ({ blocks }: Pick<Waiting, 'blocks'>) =>
  blocks === null ? null : `${blocks} starts when it is signed.`;
