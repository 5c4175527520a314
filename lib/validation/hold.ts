import { Temporal } from 'temporal-polyfill';
import { z } from 'zod';
import { orderNumberField } from './people';
import { BadInput } from '@/lib/errors';
import { wallTimeToMs } from '@/lib/schedule/digest-times';

const MOST_YEARS = 3;
const NO_DATE = 'Choose the day on which the build may be seen again.';

export const holdForm = z.object({
  orderNumber: orderNumberField,
  until: z
    .string({ error: NO_DATE })
    .regex(/^\d{4}-\d{2}-\d{2}$/, NO_DATE)
    .refine(isDate, 'There is no such day. Choose another.'),
});

export const openForm = z.object({ orderNumber: orderNumberField });

function isDate(day: string): boolean {
  try {
    return Temporal.PlainDate.from(day, { overflow: 'reject' }).toString() === day;
  } catch {
    return false;
  }
}

/**
 * The first moment of `day` (an ISO date) on the clock of `zone`, in epoch milliseconds.
 * @throws BadInput when that is not ahead of `nowMs`, or more than three years ahead
 */
export function holdUntilMs(day: string, zone: string, nowMs: number): number {
  const untilMs = wallTimeToMs(Temporal.PlainDate.from(day).toPlainDateTime(), zone);
  const today = Temporal.Instant.fromEpochMilliseconds(nowMs).toZonedDateTimeISO(zone);
  if (untilMs <= nowMs) throw new BadInput({ until: 'That day has begun already. Choose a later one.' });
  if (untilMs > today.add({ years: MOST_YEARS }).epochMilliseconds)
    throw new BadInput({ until: `A hold lasts ${MOST_YEARS} years at most. Choose an earlier day.` });
  return untilMs;
}

/** The days a hold may end on, as a date field takes them: tomorrow, and three years from today. */
export function holdRange(zone: string, nowMs: number): { first: string; last: string } {
  const today = Temporal.Instant.fromEpochMilliseconds(nowMs).toZonedDateTimeISO(zone).toPlainDate();
  return { first: today.add({ days: 1 }).toString(), last: today.add({ years: MOST_YEARS }).toString() };
}
