import { Temporal } from 'temporal-polyfill';
import { soundZone, wallTimeToMs } from './digest-times';

/** Hours on the reader's own clock between which no mail goes to them; null where there are none. */
export type QuietHours = { fromHour: number | null; toHour: number | null; zone: string };

/**
 * When the quiet hours that hold at `nowMs` end, in epoch milliseconds; null outside of them. They may run over
 * midnight. Both ends are wall times of `zone` on each day anew, so a quiet night of a clock change is an hour shorter or
 * longer: a time that is skipped moves forward, of one that comes twice the first counts. An unknown zone counts as UTC.
 */
export function quietUntil({ fromHour, toHour, zone }: QuietHours, nowMs: number): number | null {
  if (fromHour === null || toHour === null || fromHour === toHour) return null;
  const place = soundZone(zone);
  const today = Temporal.Instant.fromEpochMilliseconds(nowMs).toZonedDateTimeISO(place).toPlainDate();
  for (const days of [-1, 0]) {
    const first = today.add({ days });
    const last = toHour < fromHour ? first.add({ days: 1 }) : first;
    const startMs = wallTimeToMs(first.toPlainDateTime({ hour: fromHour }), place);
    const endMs = wallTimeToMs(last.toPlainDateTime({ hour: toHour }), place);
    if (startMs <= nowMs && nowMs < endMs) return endMs;
  }
  return null;
}
