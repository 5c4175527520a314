import { Temporal } from 'temporal-polyfill';
import { dayOf } from '@/lib/schedule/calendar';
import { addDays } from '@/lib/schedule/days';
import { wallTimeToMs } from '@/lib/schedule/digest-times';

const startOf = (day: string, zone: string) => wallTimeToMs(Temporal.PlainDate.from(day).toPlainDateTime(), zone);

/** Days away (ISO dates, '' for none) as moments in a zone: the first moment away and the first back. */
export function awayMoments({ from, until }: { from: string; until: string }, zone: string) {
  return {
    fromAt: from === '' ? null : startOf(from, zone),
    untilAt: from === '' || until === '' ? null : startOf(addDays(until, 1), zone),
  };
}

/** The other way round; what is over is no days any more. */
export function awayDays(
  { fromAt, untilAt }: { fromAt: number | null; untilAt: number | null },
  zone: string,
  nowMs: number,
) {
  if (fromAt === null || (untilAt !== null && untilAt <= nowMs)) return { from: '', until: '' };
  return { from: dayOf(fromAt, zone), until: untilAt === null ? '' : addDays(dayOf(untilAt, zone), -1) };
}
