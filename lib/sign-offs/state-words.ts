import { dayWords } from '@/lib/date-words';

export type SignOffState = 'asked' | 'signed' | 'change_asked' | 'superseded' | 'withdrawn';

/** A day of the shop's calendar, yyyy-mm-dd, in words: "12 December". It is nobody's instant, so no zone moves it. */
export const calendarDayWords = (day: string, nowMs: number) => dayWords(Date.parse(`${day}T12:00:00Z`), 'UTC', nowMs);

const late = (today: string, dueOn: string) => dueOn < today;

/** How a sign-off stands, in a few words. `today` is the shop's day. */
export function stateWords(
  { state, dueOn }: { state: SignOffState; dueOn: string },
  today: string,
): { words: string; isLate: boolean } {
  const isLate = state === 'asked' && late(today, dueOn);
  const words = {
    asked: isLate ? 'Waits, and is late' : 'Waits for a signature',
    signed: 'Signed',
    change_asked: 'A change is asked for',
    superseded: 'Another has taken its place',
    withdrawn: 'Taken back',
  } as const;
  return { words: words[state], isLate };
}
