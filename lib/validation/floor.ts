import { z } from 'zod';
import { idField, orderNumberField } from './people';
import { cleanLine } from '@/lib/rich-text/names';

const AT_ONCE = 100;
const TOO_MANY = `At most ${AT_ONCE} builds at once. Move the rest in a second go.`;

const stageKey = z.string().min(1).max(60);
const rackField = z
  .string()
  .max(60)
  .nullish()
  .transform((value) => value || null);

/** Builds to be moved, each with the stage it shall be in; a reason makes it a move back. */
export const movesBody = z.object({
  moves: z
    .array(z.object({ orderNumber: orderNumberField, toStageKey: stageKey }))
    .min(1, 'Choose at least one build.')
    .max(AT_ONCE, TOO_MANY),
  rack: rackField,
  reason: z
    .string()
    .max(2000)
    .transform((value) => cleanLine(value, 300))
    .refine((value) => value !== '', 'Say why it goes back, so that the next hands know.')
    .nullish()
    .transform((value) => value ?? null),
});
export type Moves = z.output<typeof movesBody>;

export const undoBody = z.object({
  moves: z
    .array(z.object({ orderNumber: orderNumberField, moveId: idField }))
    .min(1)
    .max(AT_ONCE, TOO_MANY),
});
export type TakenBack = z.output<typeof undoBody>;
