import { z } from 'zod';
import { cleanLine } from '@/lib/rich-text/names';

const finite = z.number({ error: 'Write this as a number.' });
const orNothing = finite.nullable();

const lengthUnits = ['in', 'mm', 'thou', '64ths'] as const;
const measureField = z.strictObject({
  text: z.string().min(1).max(40),
  unit: z.enum([...lengthUnits, 'um', 'deg', 'cents', 'kohm', 'g', 'percent', 'count', 'dE', 'lb']),
});

const nameField = z
  .string()
  .max(300)
  .transform((text) => cleanLine(text, 120));

const readingValue = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('wood_room'),
    temperatureC: finite,
    relativeHumidityPercent: finite,
    moisturePercent: orNothing,
  }),
  z.strictObject({ kind: z.literal('booth_air'), temperatureC: finite, relativeHumidityPercent: finite }),
  z.strictObject({
    kind: z.literal('coat'),
    product: nameField.refine((text) => text !== '', 'Write what was put on, as its can is labelled.'),
    coatNumber: finite,
    wetFilmUm: orNothing,
    volumeSolidsPercent: orNothing,
    dryFilmUm: orNothing,
  }),
  z.strictObject({
    kind: z.literal('colour'),
    l: finite,
    a: finite,
    b: finite,
    illuminant: z.enum(['D50', 'D65']),
  }),
  z.strictObject({
    kind: z.literal('measure'),
    name: nameField,
    measured: measureField,
    setupLine: z.string().max(40).optional(),
  }),
  z.strictObject({ kind: z.literal('abrasives'), grades: z.array(z.string().max(12)).min(1).max(20) }),
]);

const itemKey = z.string().min(1).max(80);

/** The readings of one entry; whether they can be meant is judged against the build's spec when they are stored. */
export const readingsField = z
  .array(z.strictObject({ value: readingValue, itemKey: itemKey.nullable() }))
  .max(60, 'An entry carries at most 60 readings. Post the rest in a second one.')
  .default([]);

/** Keys of the spec items an entry shows. */
export const provesField = z
  .array(itemKey)
  .max(120, 'An entry shows at most 120 items. Post the rest in a second one.')
  .transform((keys) => [...new Set(keys)])
  .default([]);
