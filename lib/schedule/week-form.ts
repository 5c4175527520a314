export const weekdayNumbers = [1, 2, 3, 4, 5, 6, 7] as const;

const CLOCK = /^([01]\d|2[0-3]):([0-5]\d)$/;

/** "07:30" as minutes after midnight; NaN for anything else. */
export function minutesOf(clock: string): number {
  const [, hour, minute] = CLOCK.exec(clock) ?? [];
  return hour === undefined ? NaN : Number(hour) * 60 + Number(minute);
}

/** The two stretches a day of the form has, by what their fields are called: the second is the one after a break. */
export const stretches = [
  { opens: 'opens', closes: 'closes' },
  { opens: 'reopens', closes: 'ends' },
] as const;

export type Hours = { weekday: number; opensAtMin: number; closesAtMin: number };

function hoursOf(day: number, opens: string, closes: string): Hours | string | null {
  if (opens === '' && closes === '') return null;
  const [opensAtMin, closesAtMin] = [minutesOf(opens), minutesOf(closes)];
  if (Number.isNaN(opensAtMin) || Number.isNaN(closesAtMin))
    return 'Enter both times, such as 07:30 and 16:00, or neither.';
  if (opensAtMin >= closesAtMin) return 'The shop must open before it closes.';
  return { weekday: day, opensAtMin, closesAtMin };
}

type DayRead = { hours: Hours[]; problem: { field: string; message: string } | null };

/** One day of the week as its fields were filled in: no, one or two stretches of work, the second after the first. */
export function readDay(day: number, typed: Record<string, string>): DayRead {
  const hours: Hours[] = [];
  for (const { opens, closes } of stretches) {
    const field = `${opens}${day}`;
    const found = hoursOf(day, typed[field] ?? '', typed[`${closes}${day}`] ?? '');
    if (typeof found === 'string') return { hours, problem: { field, message: found } };
    const before = hours.at(-1);
    if (found && before && found.opensAtMin <= before.closesAtMin)
      return { hours, problem: { field, message: 'Work after the break begins later than the work before it ends.' } };
    if (found) hours.push(found);
  }
  return { hours, problem: null };
}
