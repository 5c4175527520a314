import { z } from 'zod';
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

export const zoneForm = z.object({ zone });

export const mailForm = z.object({
  zone,
  cadence: z.enum(['at_once', 'daily', 'weekly', 'none'], { error: 'Choose how the diary comes by mail.' }),
  hourLocal: wholeWithin(0, 23, 'Choose an hour from the list.'),
  weekday: wholeWithin(1, 7, 'Choose a day of the week.'),
});
export type MailForm = z.output<typeof mailForm>;
