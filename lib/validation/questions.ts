import { z } from 'zod';
import { idempotencyKey, noteField } from './entries';
import { MAX_PHOTOS_PER_ENTRY } from '@/lib/photos/limits';
import { cleanLine } from '@/lib/rich-text/names';

const photosField = z
  .array(
    z.strictObject({
      id: z.string().min(1).max(40),
      alt: z
        .string()
        .max(1000)
        .transform((value) => cleanLine(value, 300)),
    }),
  )
  .max(MAX_PHOTOS_PER_ENTRY, `A letter holds at most ${MAX_PHOTOS_PER_ENTRY} photos. Send the rest in a second one.`)
  .default([]);

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
  photos: photosField,
  idempotencyKey,
});

/** What a letter says; photos are those already sent to the shop. */
export type Letter = {
  note: z.output<ReturnType<typeof noteField>>;
  idempotencyKey: string;
  photos?: z.output<typeof photosField>;
};

export type NewQuestion = Omit<z.output<typeof newQuestion>, 'photos'> & Letter;

export const newLetter = z.strictObject({ note: noteField('refused'), photos: photosField, idempotencyKey });

export type NewLetter = Letter;

export const correctedLetter = z.strictObject({ note: noteField('refused'), idempotencyKey });

export const newMarginNote = z.strictObject({ note: noteField('refused'), idempotencyKey });

const reasonField = z
  .string()
  .max(2000)
  .transform((value) => cleanLine(value, 300));

export const penPass = z.object({
  questionId: z.string().min(1).max(40),
  toId: z.string().min(1, 'Choose who is to answer.').max(40),
  reason: reasonField.refine((value) => value.length >= 3, 'Write why, in a few words: the next one reads it.'),
});
export type PenPass = Omit<z.output<typeof penPass>, 'questionId'>;

export const questionEnd = z.object({
  questionId: z.string().min(1).max(40),
  how: z.enum(['closed', 'no_answer_needed']),
});

export const questionRef = z.object({ questionId: z.string().min(1).max(40) });

const MAX_PHRASE_CHARS = 2000;

export const savedPhrase = z.object({
  phraseId: z.string().max(40).default(''),
  title: z
    .string()
    .max(400)
    .transform((value) => cleanLine(value, 80))
    .refine((value) => value !== '', 'Give the phrase a name to find it by.'),
  words: z
    .string()
    .max(MAX_PHRASE_CHARS, `A phrase is at most ${MAX_PHRASE_CHARS} characters long. Shorten it, or make two of it.`)
    .transform((value) => value.replace(/\r\n?/g, '\n').trim())
    .refine((value) => value !== '', 'Write the words of the phrase.'),
  whose: z.enum(['mine', 'shop'], { error: 'Choose whose phrase it is.' }),
});
export type SavedPhrase = z.output<typeof savedPhrase>;

export const phraseRef = z.object({ phraseId: z.string().min(1).max(40) });

const MAX_DUE_HOURS = 200;

export const topicForm = z.object({
  topicId: z.string().max(40).default(''),
  name: z
    .string()
    .max(400)
    .transform((value) => cleanLine(value, 60))
    .refine((value) => value !== '', 'Give the topic a name.'),
  /** A department's key, `rep`, or `reps_only`. */
  answers: z.string().min(1, 'Choose who answers.').max(60),
  dueHours: z.coerce
    .number({ error: 'Write the hours as a number.' })
    .int('Write whole hours.')
    .min(1, 'An answer is due after one working hour at the soonest.')
    .max(MAX_DUE_HOURS, `At most ${MAX_DUE_HOURS} working hours.`),
});
export type TopicForm = z.output<typeof topicForm>;

export const leadForm = z.object({ departmentKey: z.string().min(1).max(60), leadId: z.string().max(40) });
export const fallbackForm = z.object({ userId: z.string().max(40) });

const dayField = z.union([z.literal(''), z.iso.date()], { error: 'Write a day, or leave it empty.' });

export const awayForm = z
  .object({ from: dayField, until: dayField })
  .refine(({ from, until }) => until === '' || from !== '', { path: ['from'], message: 'Write the first day away.' })
  .refine(({ from, until }) => until === '' || until >= from, {
    path: ['until'],
    message: 'The last day away comes before the first. Change one of them.',
  });
