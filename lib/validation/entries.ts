import { z } from 'zod';
import { provesField, readingsField } from './readings';
import { MAX_PHOTOS_PER_ENTRY } from '@/lib/photos/limits';
import { checkNote } from '@/lib/rich-text/check';
import { cleanLine } from '@/lib/rich-text/names';

/** A rich-text document, checked and rebuilt; a blank one is fine where photos can speak for themselves. */
export const noteField = (blank: 'allowed' | 'refused') =>
  z.unknown().transform((value, context) => {
    const result = checkNote(value, { blank });
    if (result.ok) return { doc: result.doc, text: result.text };
    context.addIssue({ code: 'custom', message: result.message });
    return z.NEVER;
  });

export const idempotencyKey = z.string().min(16).max(64);
const photoId = z.string().min(1).max(40);

export const newEntry = z
  .strictObject({
    orderNumber: z.string().min(1).max(20),
    idempotencyKey,
    stageId: z.string().min(1, 'Choose the stage this belongs to.').max(40),
    startStage: z.boolean(),
    audience: z.enum(['buyer', 'shop'], { error: 'Choose who sees it: the buyer, or the shop only.' }),
    note: noteField('allowed'),
    photos: z
      .array(
        z.strictObject({
          id: photoId,
          alt: z
            .string()
            .max(1000)
            .transform((value) => cleanLine(value, 300)),
        }),
      )
      .max(
        MAX_PHOTOS_PER_ENTRY,
        `An entry holds at most ${MAX_PHOTOS_PER_ENTRY} photos. Post the rest in a second one.`,
      ),
    readings: readingsField,
    proves: provesField,
  })
  .refine((entry) => entry.note.text.trim() !== '' || entry.photos.length > 0 || entry.readings.length > 0, {
    path: ['note'],
    message: 'There is nothing in it yet. Add a photo or a reading, or write a line.',
  });

export type NewEntry = z.output<typeof newEntry>;

export const editedEntry = z.strictObject({ revision: z.int().min(1), note: noteField('allowed') });

export type EditedEntry = z.output<typeof editedEntry>;
