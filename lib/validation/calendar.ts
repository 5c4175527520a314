import { z } from 'zod';
import { idField } from './people';
import { cleanLine } from '@/lib/rich-text/names';
import { isDate } from '@/lib/schedule/days';
import { isZone } from '@/lib/schedule/digest-times';
import { minutesOf, readDay, stretches, weekdayNumbers, type Hours } from '@/lib/schedule/week-form';

const clockField = z.string().max(8).default('');
const times = Object.fromEntries(
  weekdayNumbers.flatMap((day) =>
    stretches.flatMap(({ opens, closes }) => [
      [`${opens}${day}`, clockField],
      [`${closes}${day}`, clockField],
    ]),
  ),
);

/** The week as the form sends it: a day with no times is a day off. */
export const hoursForm = z.object(times).transform((typed, context): Hours[] => {
  const days = weekdayNumbers.map((day) => readDay(day, typed));
  const problems = days.flatMap(({ problem }) => problem ?? []);
  for (const { field, message } of problems) context.addIssue({ code: 'custom', path: [field], message });
  const week = days.flatMap(({ hours }) => hours);
  if (week.length === 0 && problems.length === 0)
    context.addIssue({ code: 'custom', path: ['opens1'], message: 'Enter at least one day of the week.' });
  return week;
});

export const zoneForm = z.object({
  zone: z
    .string()
    .trim()
    .max(60)
    .refine(isZone, 'Write the time zone of a place, such as America/Chicago. An abbreviation such as EST is not one.'),
});

export const holidayForm = z.object({
  country: z.string().max(4),
  region: z
    .string()
    .max(8)
    .optional()
    .transform((value) => value || null),
});

const LONGEST_DAYS = 366;
const day = (what: string) => z.string().refine(isDate, `Choose the ${what} day.`);

export const closureForm = z
  .object({
    name: z
      .string()
      .max(500)
      .transform((value) => cleanLine(value, 80))
      .refine((value) => value !== '', 'Write what it is, such as Summer shutdown.'),
    startsOn: day('first'),
    endsOn: z.string().max(10),
    closesAt: z.string().max(8).default(''),
  })
  .transform(({ closesAt, endsOn, ...closure }, context) => {
    const last = endsOn === '' ? closure.startsOn : endsOn;
    const closesAtMin = closesAt === '' ? null : minutesOf(closesAt);
    const wrong = (path: string, message: string) => context.addIssue({ code: 'custom', path: [path], message });
    if (!isDate(last)) wrong('endsOn', 'Choose the last day, or leave it empty for a single one.');
    else if (last < closure.startsOn) wrong('endsOn', 'It ends before it starts.');
    else if (Date.parse(last) - Date.parse(closure.startsOn) >= LONGEST_DAYS * 86_400_000)
      wrong('endsOn', 'That is longer than a year. Check the last day.');
    if (Number.isNaN(closesAtMin) || closesAtMin === 0) wrong('closesAt', 'Write when work ends, such as 12:00.');
    return { ...closure, endsOn: last, closesAtMin };
  });
export type NewClosure = z.output<typeof closureForm>;

export const closureRef = z.object({ closureId: idField });

const MOST_DAYS = 2000;
const wholeDays = (least: number, refusal: string) =>
  z
    .string()
    .trim()
    .regex(/^\d{1,4}$/, refusal)
    .transform(Number)
    .refine((value) => value >= least && value <= MOST_DAYS, refusal);

const optionalDays = z
  .string()
  .trim()
  .max(5)
  .refine(
    (value) => value === '' || (/^\d{1,4}$/.test(value) && Number(value) <= MOST_DAYS),
    `Whole days from 0 to ${MOST_DAYS}.`,
  )
  .transform((value) => (value === '' ? null : Number(value)));

export const stageForm = z
  .object({
    routeId: idField,
    stageKey: z.string().min(1).max(60),
    bestDays: optionalDays,
    likelyDays: optionalDays,
    worstDays: optionalDays,
    minimumWaitDays: wholeDays(0, 'Whole days, 0 for none.'),
    silenceDays: wholeDays(1, 'Whole days, at least 1.'),
  })
  .superRefine(({ bestDays, likelyDays, worstDays }, context) => {
    const wrong = (path: string, message: string) => context.addIssue({ code: 'custom', path: [path], message });
    const named = [bestDays, likelyDays, worstDays].filter((days) => days !== null);
    if (named.length > 0 && named.length < 3) wrong('likelyDays', 'Fill in all three estimates, or none.');
    else if (bestDays !== null && likelyDays !== null && bestDays > likelyDays)
      wrong('bestDays', 'The shortest time is longer than the likely one.');
    else if (worstDays !== null && likelyDays !== null && worstDays < likelyDays)
      wrong('worstDays', 'The longest time is shorter than the likely one.');
  });
export type StageEstimate = z.output<typeof stageForm>;

export const capacityForm = z.object({
  department: z.string().min(1).max(60),
  capacityPerWeek: z
    .string()
    .trim()
    .refine(
      (value) => value === '' || (/^\d{1,3}$/.test(value) && Number(value) >= 1),
      'A whole number of builds, at least 1.',
    )
    .transform((value) => (value === '' ? null : Number(value))),
});
export type Capacity = z.output<typeof capacityForm>;
