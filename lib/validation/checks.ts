import { z } from 'zod';
import { idField, orderNumberField } from './people';
import { cleanLine } from '@/lib/rich-text/names';

export const checkMarks = ['pass', 'fail', 'not_applicable'] as const;
export type CheckMark = (typeof checkMarks)[number];

const MAX_LINE = 200;
const MAX_WORDS = 2000;

const line = (most: number) =>
  z
    .string()
    .max(MAX_WORDS)
    .transform((value) => cleanLine(value, most));
const words = z.string().trim().max(MAX_WORDS, `Keep it to ${MAX_WORDS} letters.`);
const optionalId = z
  .string()
  .max(40)
  .default('')
  .transform((value) => value || null);
const checkbox = z
  .enum(['on'])
  .optional()
  .transform((value) => value === 'on');

export const newCheck = z.object({ orderNumber: orderNumberField, listId: idField });

/** One line of an inspection, as the phone sends it. */
export const markedLine = z.strictObject({
  lineId: idField,
  mark: z.enum(checkMarks, { error: 'Choose pass, fail or not applicable.' }),
  note: line(300),
  photoId: z.string().min(1).max(40).nullable(),
});
export type MarkedLine = z.output<typeof markedLine>;

export const checkEnd = z.object({
  orderNumber: orderNumberField,
  runId: idField,
  backToStageId: optionalId,
  reason: line(300).default(''),
});
export type CheckEnd = z.output<typeof checkEnd>;

export const toldCheck = z.object({
  orderNumber: orderNumberField,
  runId: idField,
  words: words.min(1, 'Write what the player is told, or keep it in the shop.'),
});
export const keptCheck = z.object({ orderNumber: orderNumberField, runId: idField });

export const newCheckList = z.object({
  routeId: z.string().min(1, 'Choose a route.').max(40),
  stageKey: z.string().min(1, 'Choose the stage it is gone through in.').max(40),
  name: line(80).refine((value) => value !== '', 'Give the list a name, such as Before paint.'),
});
export const checkListRef = z.object({ listId: idField });

const lineText = line(MAX_LINE).refine((value) => value !== '', 'Write what is looked at.');
export const newCheckLine = z.object({ listId: idField, text: lineText, photoNeeded: checkbox });
export const changedCheckLine = z.object({ lineId: idField, text: lineText, photoNeeded: checkbox });
export const checkLineRef = z.object({ lineId: idField });

export const concessionForm = z.object({
  orderNumber: orderNumberField,
  itemKey: z.string().min(1, 'Choose the item.').max(80),
  reason: line(500).refine((value) => value.length >= 8, 'Say why it is good as it is, in a sentence the owner reads.'),
  dueOn: z.string().max(10),
});
export type ConcessionWish = z.output<typeof concessionForm>;

export const finishedBuild = z.object({ orderNumber: orderNumberField });
export const shipment = z.object({
  orderNumber: orderNumberField,
  carrier: line(60).refine((value) => value !== '', 'Write who carries it, or “collected at the shop”.'),
  number: line(60).default(''),
});
export type Shipment = z.output<typeof shipment>;

export const proofLink = z.object({
  orderNumber: orderNumberField,
  itemKey: z.string().min(1, 'Choose the item.').max(80),
  entryId: z.string().min(1, 'Choose the entry that shows it.').max(40),
});
