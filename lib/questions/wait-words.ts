const HOUR_MS = 3_600_000;
const DAY_HOURS = 24;

/** How long something has waited, in whole hours, then days, then weeks: "under an hour", "1 hour", "3 days", "2 weeks". */
export function waitWords(sinceMs: number, nowMs: number): string {
  const hours = Math.floor((nowMs - sinceMs) / HOUR_MS);
  if (hours < 1) return 'under an hour';
  if (hours < DAY_HOURS) return counted(hours, 'hour');
  const days = Math.floor(hours / DAY_HOURS);
  return days < 14 ? counted(days, 'day') : counted(Math.floor(days / 7), 'week');
}

const counted = (count: number, noun: string) => `${count} ${noun}${count === 1 ? '' : 's'}`;
