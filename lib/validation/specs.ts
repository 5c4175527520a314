import { z } from 'zod';
import { idField, orderNumberField } from './people';
import { cleanLine } from '@/lib/rich-text/names';
import { specGroups, type SpecDocument } from '@/lib/specs/document';

const LONGEST_DOCUMENT = 400_000;
const MOST_PRICE_CENTS = 10_000_000;
const MOST_DAYS = 365;

const units = ['in', 'mm', 'thou', '64ths', 'um', 'deg', 'cents', 'kohm', 'g', 'percent', 'count', 'dE', 'lb'] as const;

const line = (longest: number) =>
  z
    .string()
    .max(4000)
    .transform((value) => cleanLine(value, longest));

const stageKey = z.string().min(1).max(60).nullable();
const itemKey = z.string().regex(/^[a-z0-9_]{1,60}$/, 'An item has lost its key. Load the page again.');
const typed = line(60);

const base = {
  key: itemKey,
  group: z.enum(specGroups),
  label: line(120),
  frozenFrom: stageKey,
  provenAt: stageKey,
};

const colour = z.strictObject({
  l: z.number(),
  a: z.number(),
  b: z.number(),
  illuminant: z.enum(['D50', 'D65']),
  limitDeltaE: z.number(),
});

const specItem = z.discriminatedUnion('kind', [
  z.strictObject({
    ...base,
    kind: z.literal('measure'),
    aim: z.strictObject({ text: typed, unit: z.enum(units, 'Choose a unit from the list.') }),
    tolerance: z.strictObject({ plus: typed, minus: typed }).nullable(),
  }),
  z.strictObject({
    ...base,
    kind: z.literal('material'),
    materialKey: z.string().min(1).max(60).nullable(),
    words: line(400),
  }),
  z.strictObject({
    ...base,
    kind: z.literal('choice'),
    value: line(200),
    options: z.array(line(200)).max(30),
  }),
  z.strictObject({
    ...base,
    kind: z.literal('look'),
    words: line(400),
    documentId: z.string().min(1).max(40).nullable(),
    colour: colour.nullable(),
  }),
]);

export const specDocument = z.strictObject({ items: z.array(specItem).max(400) }) satisfies z.ZodType<SpecDocument>;

/** A document travels as text in one field of the form. */
const documentField = z
  .string()
  .max(LONGEST_DOCUMENT, 'This spec is too long to be kept. Take some words out.')
  .transform((text, context) => {
    try {
      return JSON.parse(text) as unknown;
    } catch {
      context.addIssue({ code: 'custom', message: 'The form did not arrive whole. Please save again.' });
      return z.NEVER;
    }
  })
  .pipe(specDocument);

const whole = (lowest: number, highest: number, sentence: string) =>
  z
    .string({ error: sentence })
    .trim()
    .regex(/^\d{1,9}$/, sentence)
    .transform(Number)
    .refine((value) => value >= lowest && value <= highest, sentence);

const revision = whole(1, 999_999_999, 'Load the page again: it has lost track of what it shows.');
const dueOn = z.string().regex(/^\d{4}-\d{2}-\d{2}$/, 'Choose the day by which the owner should answer.');
const message = line(2000);
const stageOrNone = z
  .string()
  .max(60)
  .transform((value) => value || null);

export const startSpecForm = z.object({ orderNumber: orderNumberField, templateId: idField });

export const draftForm = z.object({ orderNumber: orderNumberField, revision, document: documentField });
export type SpecEdit = z.output<typeof draftForm>;

export const sendSpecForm = z.object({
  orderNumber: orderNumberField,
  revision,
  message,
  dueOn,
  blocksStageKey: stageOrNone,
});
export type SpecSending = z.output<typeof sendSpecForm>;

export const askChangeForm = z.object({
  orderNumber: orderNumberField,
  itemKey,
  wish: line(1000).refine((value) => value.length >= 3, 'Say in a few words what you would like instead.'),
});
export type ChangeAsked = z.output<typeof askChangeForm>;

const NO_PRICE = 'Give the price as a number such as 180 or 180.50; 0 when there is none.';

export const offerChangeForm = z.object({
  requestId: idField,
  price: z
    .string({ error: NO_PRICE })
    .trim()
    .regex(/^\d{1,7}([.,]\d{1,2})?$/, NO_PRICE)
    .transform((text) => Math.round(Number(text.replace(',', '.')) * 100))
    .refine((cents) => cents <= MOST_PRICE_CENTS, 'That is more than a change can cost. Look at the number again.'),
  extraDays: whole(0, MOST_DAYS, `Give the working days it adds as a whole number from 0 to ${MOST_DAYS}.`),
  message,
  dueOn,
});
export type ChangeOffer = z.output<typeof offerChangeForm>;

export const declineChangeForm = z.object({
  requestId: idField,
  answer: line(1000).refine((value) => value.length >= 3, 'Say why the shop cannot do it. The owner reads this.'),
});
export type ChangeDeclined = z.output<typeof declineChangeForm>;
