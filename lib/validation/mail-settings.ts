import { z } from 'zod';
import { mailChoiceNames } from '@/lib/mail/choices';
import { mailKinds } from '@/lib/mail/kinds';
import { localeTags } from '@/lib/mail/locales';
import { isZone } from '@/lib/schedule/digest-times';

const zone = z
  .string({ error: 'Choose where you are.' })
  .max(60, 'Choose where you are from the list.')
  .refine(isZone, 'Choose where you are from the list.');

/** A form sends figures as text: digits only, so that "" and "8.5" are not read as numbers. */
const wholeWithin = (lowest: number, highest: number, sentence: string) =>
  z
    .string({ error: sentence })
    .regex(/^\d{1,2}$/, sentence)
    .transform(Number)
    .refine((value) => value >= lowest && value <= highest, sentence);

const NO_SUCH_HOUR = 'Choose an hour from the list, or none.';

/** An hour, or none. */
const hourOrNone = z
  .string()
  .regex(/^\d{0,2}$/, NO_SUCH_HOUR)
  .transform((hour) => (hour === '' ? null : Number(hour)))
  .refine((hour) => hour === null || hour <= 23, NO_SUCH_HOUR)
  .optional();

const quietTogether = 'Choose both ends of your quiet hours, or neither, and two different hours.';

export const mailForm = z
  .object({
    zone,
    cadence: z.enum(['at_once', 'daily', 'weekly', 'none'], { error: 'Choose how the diary comes by mail.' }),
    hourLocal: wholeWithin(0, 23, 'Choose an hour from the list.'),
    weekday: wholeWithin(1, 7, 'Choose a day of the week.'),
    quietFromHour: hourOrNone,
    quietToHour: hourOrNone,
  })
  .refine(
    ({ quietFromHour: from = null, quietToHour: to = null }) =>
      from === null ? to === null : to !== null && to !== from,
    {
      path: ['quietToHour'],
      error: quietTogether,
    },
  );
export type MailForm = z.output<typeof mailForm>;

/** How each kind of mail comes, as the page of choices sends it. */
export const choicesForm = z
  .partialRecord(z.enum(mailKinds), z.enum(mailChoiceNames, { error: 'Choose one of the three.' }))
  .transform((chosen) => mailKinds.flatMap((kind) => (chosen[kind] ? [{ kind, choice: chosen[kind] }] : [])));

export const wordingForm = z.object({
  locale: z.enum(localeTags, { error: 'Choose a way to write dates from the list.' }),
  units: z.enum(['in', 'mm'], { error: 'Choose inches or millimetres.' }),
});
