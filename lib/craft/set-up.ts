import { verdict, type Measure, type Quantity } from './measure';
import { readMeasure } from './read-measure';
import { setupRanges, type SetupRange } from './set-up-ranges';

export type Instrument = 'guitar' | 'bass';
export type PickupPlace = 'neck' | 'middle' | 'bridge';

export type SetupSheet = {
  instrument: Instrument;
  stringCount: number;
  /** How many strings, from the thinnest on, are plain; the rest are wound. */
  plainCount: number;
  pickups: PickupPlace[];
};

/** One line of the set-up sheet: what is measured, how, and against which aim and tolerance. */
export type SetupLine = {
  key: string;
  label: string;
  how: string;
  aim: Measure;
  /** As typed, in the aim's unit. */
  tolerance: string;
  quantity: Quantity | null;
  provenance: SetupRange['provenance'];
};

const MOST_STRINGS = 18;

/** Further off than a semitone the saddle is not what is wrong, or the wrong note was fretted. */
const SANE_CENTS = 100;

const quantities: Record<SetupRange['kind'], Quantity | null> = {
  relief: 'relief',
  action: 'action',
  nut_slot: 'string height at the first fret',
  pickup_height: 'pickup height',
  intonation: null,
};

/**
 * The lines of a set-up sheet in the order they are worked: relief, nut slots, action, pickup heights, intonation.
 * `ranges` are the shop's own figures; the starting points when left out.
 * @throws RangeError when the strings are not a whole number from 1 to 18, or more of them are plain than there are
 */
export function setupLines(sheet: SetupSheet, ranges: readonly SetupRange[] = setupRanges): SetupLine[] {
  const { instrument, stringCount, plainCount, pickups } = sheet;
  if (!Number.isInteger(stringCount) || stringCount < 1 || stringCount > MOST_STRINGS) {
    throw new RangeError(`An instrument has 1 to ${MOST_STRINGS} strings; got ${stringCount}.`);
  }
  if (!Number.isInteger(plainCount) || plainCount < 0 || plainCount > stringCount) {
    throw new RangeError(`Of ${stringCount} strings 0 to ${stringCount} are plain; got ${plainCount}.`);
  }
  const line = (rangeKey: string, key: string, label: string) => lineOf(instrument, ranges, rangeKey, key, label);
  const strings = Array.from({ length: stringCount }, (_, index) => index + 1);
  return [
    line('relief', 'relief', 'Neck relief at the 7th fret'),
    ...strings.map((n) =>
      line(n <= plainCount ? 'nut_slot_plain' : 'nut_slot_wound', `nut_slot_${n}`, `Nut slot, string ${n}`),
    ),
    line('action_treble', 'action_treble', 'Action at the 12th fret, treble side'),
    line('action_bass', 'action_bass', 'Action at the 12th fret, bass side'),
    ...pickups.flatMap((place) => [
      line(`pickup_${place}`, `pickup_${place}_treble`, `Pickup height, ${place}, treble side`),
      line(`pickup_${place}`, `pickup_${place}_bass`, `Pickup height, ${place}, bass side`),
    ]),
    ...strings.map((n) => line('intonation', `intonation_${n}`, `Intonation, string ${n}`)),
  ].filter((found) => found !== null);
}

/** Null where the shop has taken that row off its list. */
function lineOf(
  instrument: Instrument,
  ranges: readonly SetupRange[],
  rangeKey: string,
  key: string,
  label: string,
): SetupLine | null {
  const range = ranges.find((row) => row.key === rangeKey && row.instrument === instrument);
  if (!range) return null;
  const { aim, tolerance, how, provenance } = range;
  return { key, label, how, aim, tolerance, quantity: quantities[range.kind], provenance };
}

export type SetupVerdict = { standing: 'within' | 'outside' | 'refused'; words: string };

/** What is to be said of a value typed on a line: within, outside, or a sentence why it cannot be meant. */
export function setupVerdict(line: SetupLine, text: string): SetupVerdict {
  const read = readMeasure(text, line.aim.unit, line.quantity ?? undefined);
  if (!read.ok) return { standing: 'refused', words: read.message };
  if (line.aim.unit === 'cents' && Math.abs(read.value) > SANE_CENTS) {
    const words = `${text.trim()} cents is more than a semitone. Check that the note at the 12th fret was played.`;
    return { standing: 'refused', words };
  }
  const found = verdict({ text, unit: line.aim.unit }, line.aim, line.tolerance);
  return found.ok ? { standing: found.standing, words: found.words } : { standing: 'refused', words: found.message };
}

/** Said before anybody turns a truss rod. Common practice, no source. */
export const TRUSS_ROD_SENTENCE =
  'Turn a truss rod by no more than a quarter turn, let the neck settle, and measure again before the next. If it is stiff or does nothing, stop and ask the neck department.';

/** A sentence when a turn of the truss rod is more than is done at once, or no number; null when it is fine. */
export function trussRodTrouble(turns: number): string | null {
  if (!Number.isFinite(turns)) return 'Write the turn as a part of a whole turn, such as 0.25.';
  return Math.abs(turns) > 0.25 ? TRUSS_ROD_SENTENCE : null;
}
