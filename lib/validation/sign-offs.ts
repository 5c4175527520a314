import { z } from 'zod';
import { idField, orderNumberField } from './people';
import { MAX_PDF_BYTES } from '@/lib/documents/limits';
import { PDF_REFUSALS } from '@/lib/documents/refusals';
import { cleanText, hasVisibleText } from '@/lib/rich-text/characters';
import { cleanLine } from '@/lib/rich-text/names';

const MAX_WORDS = 2000;

/** Plain words over several lines: cleaned, and '' when nobody could see any of them. */
const words = z
  .string()
  .max(MAX_WORDS * 2, `That is longer than ${MAX_WORDS} letters. Shorten it.`)
  .transform((value) => (hasVisibleText(value) ? cleanText(value).trim() : ''))
  .refine((value) => value.length <= MAX_WORDS, `That is longer than ${MAX_WORDS} letters. Shorten it.`);

const optionalId = z
  .string()
  .max(60)
  .transform((value) => value || null);

export const newDocument = z.strictObject({
  orderNumber: orderNumberField,
  /** The sender's own mark for this upload: the same one again means the same file. */
  uploadKey: z.string().min(8).max(64),
  label: z
    .string()
    .max(400)
    .transform((value) => cleanLine(value, 120) || 'Drawing'),
  sizeBytes: z.int().min(1, PDF_REFUSALS.empty).max(MAX_PDF_BYTES, PDF_REFUSALS.too_large),
  sha256: z.string().regex(/^[A-Za-z0-9+/]{43}=$/, 'The file could not be measured here. Choose it again.'),
});
export type NewDocument = z.output<typeof newDocument>;

/** A drawing or a sample put before the owner: a PDF or a photo that was sent up before. */
export const newSignOff = z
  .object({
    orderNumber: orderNumberField,
    kind: z.enum(['drawing', 'sample'], { error: 'Say whether it is a drawing or a sample.' }),
    title: z
      .string()
      .max(1000)
      .transform((value) => cleanLine(value, 120))
      .refine((value) => value !== '', 'Give it a name that says what it shows, such as “Headstock logo, drawing 3”.'),
    message: words,
    dueOn: z.string().min(1, 'Choose the day it should be signed by.').max(10),
    blocksStageKey: optionalId,
    itemKey: optionalId.optional(),
    replacesId: optionalId.optional(),
    documentId: optionalId,
    photoId: optionalId,
  })
  .refine(({ documentId, photoId }) => (documentId === null) !== (photoId === null), {
    path: ['file'],
    error: 'Choose a PDF or a photo to be signed, and wait until it has arrived.',
  });
export type NewSignOff = z.output<typeof newSignOff>;

export const signature = z.object({ signOffId: idField, name: z.string().max(400) });
export type Signature = z.output<typeof signature>;

export const changeWish = z.object({
  signOffId: idField,
  words: words.refine((value) => value !== '', 'Say what should be different, so that the shop can change it.'),
});
export type ChangeWish = z.output<typeof changeWish>;

export const signOffId = z.object({ signOffId: idField });
