import { z } from 'zod';
import { idempotencyKey, noteField } from './entries';
import { cleanLine } from '@/lib/rich-text/names';

export const newQuestion = z.strictObject({
  orderNumber: z.string().min(1).max(20),
  entryId: z.string().max(40).nullable(),
  topicId: z.string().min(1, 'Choose what it is about, so that it reaches the right person.').max(40),
  subject: z
    .string()
    .max(1000)
    .transform((value) => cleanLine(value, 120))
    .refine((value) => value !== '', 'Give your question a few words as its heading.'),
  note: noteField('refused'),
  idempotencyKey,
});

export type NewQuestion = z.output<typeof newQuestion>;

export const newLetter = z.strictObject({ note: noteField('refused'), idempotencyKey });

export type NewLetter = z.output<typeof newLetter>;
