import { colourVerdict, doubtLab, MixedIlluminants, type LabColour } from '../craft/colour-difference';
import { isRefused, wrong } from '../craft/doubt';
import { figure } from '../craft/figure';
import type { AimedColour } from '../specs/document';
import { readNumberField } from './number-field';
import type { ColourReading, ShownReading } from './reading';
import { fieldDoubts, nothingRead, type PartRead, type TypedReadings } from './typed';

export type ColourLine = { itemKey: string; label: string; aim: AimedColour };

type Parts = Pick<TypedReadings, 'l' | 'a' | 'b' | 'illuminant'>;

/** A colour from its fields, against the approved sample where the spec has one. */
export function readColour(typed: Parts, line: ColourLine | null): PartRead {
  const texts = { l: typed.l, a: typed.a, b: typed.b };
  if (Object.values(texts).every((text) => text.trim() === '')) return nothingRead;
  const read = { l: readNumberField(typed.l, []), a: readNumberField(typed.a, []), b: readNumberField(typed.b, []) };
  const missing = Object.fromEntries(
    Object.entries(texts).flatMap(([field, text]) =>
      text.trim() === '' ? [[field, 'Write all three figures: L, a and b.']] : [],
    ),
  );
  const typos = fieldDoubts({ l: read.l.doubt, a: read.a.doubt, b: read.b.doubt });
  const [l, a, b] = [read.l.value, read.a.value, read.b.value];
  if (l === null || a === null || b === null) return { reading: null, shown: null, doubts: typos, missing };
  const value: ColourReading = { kind: 'colour', l, a, b, illuminant: typed.illuminant };
  const doubts = fieldDoubts(oddFields(value, line));
  if (isRefused(Object.values(doubts))) return { reading: null, shown: null, doubts, missing };
  const reading = { value, itemKey: line?.itemKey ?? null };
  return { reading, shown: showColour(value, line), doubts, missing };
}

function oddFields(value: ColourReading, line: ColourLine | null) {
  const [odd] = doubtLab(value);
  const field = value.l < 0 || value.l <= 1 || value.l > 100 ? 'l' : Math.abs(value.a) > Math.abs(value.b) ? 'a' : 'b';
  return { [field]: odd, illuminant: line && isMixed(value, line) ? wrong(mixedSentence(value, line)) : null };
}

const isMixed = (value: ColourReading, { aim }: ColourLine) => value.illuminant !== aim.illuminant;

const mixedSentence = (value: LabColour, { aim }: ColourLine) => new MixedIlluminants(aim, value).message;

/** Why a colour cannot be meant, or null. */
export function colourTrouble(value: ColourReading, line: ColourLine | null): string | null {
  const odd = doubtLab(value).find(({ kind }) => kind === 'wrong');
  return odd?.sentence ?? (line && isMixed(value, line) ? mixedSentence(value, line) : null);
}

/** "ΔE 1.4" beside its limit. @throws RangeError as `colourVerdict` */
export function showColour(value: ColourReading, line: ColourLine | null): ShownReading {
  const lab = `L ${figure(value.l, 1)}, a ${figure(value.a, 1)}, b ${figure(value.b, 1)} (${value.illuminant})`;
  if (!line) return { kind: 'colour', label: 'Colour', figures: lab, words: '', standing: null, bar: null };
  const { deltaE, isWithin, words } = colourVerdict(line.aim, value, line.aim.limitDeltaE);
  const [figures = words, ...rest] = words.split(', ');
  return {
    kind: 'colour',
    label: `${line.label}, against the approved sample`,
    figures,
    words: rest.join(', '),
    standing: isWithin ? 'within' : 'outside',
    bar: { high: line.aim.limitDeltaE, value: deltaE },
  };
}
