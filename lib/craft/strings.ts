import { gaugeWords, readGauges, type Gauge } from './gauges';
import { noteFrequencyHz, readNotes, type Note } from './notes';
import type { Refused } from './read-measure';
import { listedGauges, unitWeight } from './string-weights';
import { MM_PER_INCH } from './units';

/** What makes a set: strings from the treble side to the bass side, and the scales of the two outer ones. */
export type StringPlan = {
  strings: readonly { note: Note; gauge: Gauge }[];
  bassScaleMm: number;
  trebleScaleMm: number;
  /** Concert pitch; 440 Hz unless given. */
  a4Hz?: number;
};

export type StringTension = {
  /** 1 is the string on the treble side. */
  number: number;
  note: Note;
  gauge: Gauge;
  scaleLengthIn: number;
  frequencyHz: number;
  tensionLb: number;
  tensionN: number;
  /** Of the whole set, 0 to 1. */
  share: number;
  /** False when the weight was taken between two published gauges. */
  isListed: boolean;
};

export type SetTension = { strings: StringTension[]; totalLb: number; totalN: number };

/** g in in/s2 as string makers' charts use it (exactly 386.0886), kept so that results match the charts. */
const CHART_GRAVITY_IN_PER_S2 = 386.4;
const NEWTONS_PER_LB = 4.4482216152605;

/** Tension in lb: T = UW (2 L F)^2 / 386.4. Source: D'Addario, String Tension 101. @throws RangeError when one of them is not above 0 */
export function stringTensionLb(unitWeightLbPerIn: number, scaleLengthIn: number, frequencyHz: number): number {
  if (!(unitWeightLbPerIn > 0 && scaleLengthIn > 0 && frequencyHz > 0)) {
    throw new RangeError('A string has a weight, a length and a pitch above 0.');
  }
  return (unitWeightLbPerIn * (2 * scaleLengthIn * frequencyHz) ** 2) / CHART_GRAVITY_IN_PER_S2;
}

/** Pounds-force as newtons: 1 lbf = 4.4482216152605 N exactly. */
export function newtons(lb: number): number {
  return lb * NEWTONS_PER_LB;
}

/**
 * The strings of a set from its tuning and gauges as typed, treble side first. Tuning may start at either side; gauges too, light or
 * heavy first. Refused with a sentence when a note or gauge cannot be read or their numbers differ.
 */
export function readStringSet(
  tuning: string,
  gauges: string,
): { ok: true; strings: { note: Note; gauge: Gauge }[] } | Refused {
  const readTuning = readNotes(tuning);
  if (!readTuning.ok) return readTuning;
  const readSet = readGauges(gauges);
  if (!readSet.ok) return readSet;
  const notes = trebleFirst(readTuning.notes, (note) => -note.midi);
  const set = trebleFirst(readSet.gauges, (gauge) => gauge.gaugeThou);
  if (set.length !== notes.length) return { ok: false, message: countTrouble(set.length, notes.length) };
  return { ok: true, strings: notes.flatMap((note, i) => (set[i] ? [{ note, gauge: set[i] }] : [])) };
}

/**
 * Tension of each string and of the set, in lb and N. With two scales each string's length lies between them in equal steps, as
 * strings that fan out evenly do. Refused with a sentence when a gauge is outside the published weights or a scale is not above 0.
 */
export function setTension(plan: StringPlan): ({ ok: true } & SetTension) | Refused {
  if (!(plan.bassScaleMm > 0 && plan.trebleScaleMm > 0)) return { ok: false, message: 'Give the scale length first.' };
  if (plan.strings.length === 0) return { ok: false, message: 'Give the tuning and the gauges first.' };
  const strings: Omit<StringTension, 'share'>[] = [];
  for (const [index, { note, gauge }] of plan.strings.entries()) {
    const weight = unitWeight(gauge.gaugeThou, gauge.construction);
    if (!weight) return { ok: false, message: outsideTable(gauge) };
    const scaleLengthIn = scaleOf(plan, index) / MM_PER_INCH;
    const frequencyHz = noteFrequencyHz(note.midi, plan.a4Hz);
    const tensionLb = stringTensionLb(weight.lbPerIn, scaleLengthIn, frequencyHz);
    const tensionN = newtons(tensionLb);
    strings.push({
      number: index + 1,
      note,
      gauge,
      scaleLengthIn,
      frequencyHz,
      tensionLb,
      tensionN,
      isListed: weight.isListed,
    });
  }
  const totalLb = strings.reduce((sum, { tensionLb }) => sum + tensionLb, 0);
  return {
    ok: true,
    totalLb,
    totalN: newtons(totalLb),
    strings: strings.map((string) => ({ ...string, share: string.tensionLb / totalLb })),
  };
}

function scaleOf({ bassScaleMm, trebleScaleMm, strings }: StringPlan, index: number): number {
  const share = strings.length === 1 ? 0 : index / (strings.length - 1);
  return trebleScaleMm + (bassScaleMm - trebleScaleMm) * share;
}

/** Turned round when its first is heavier or lower than its last, so that the treble side comes first. */
function trebleFirst<T>(items: readonly T[], weight: (item: T) => number): T[] {
  const [first, last] = [items[0], items.at(-1)];
  const isTurned = first !== undefined && last !== undefined && weight(first) > weight(last);
  return isTurned ? items.toReversed() : [...items];
}

function countTrouble(strings: number, notes: number): string {
  return strings > notes
    ? `There are ${strings} strings and only ${notes} notes. Give each string its note.`
    : `There are ${notes} notes and only ${strings} gauges. Give each note its gauge.`;
}

function outsideTable({ gaugeThou, construction }: Gauge): string {
  const listed = listedGauges(construction);
  const [lightest, heaviest] = [gaugeWords(listed[0] ?? 0), gaugeWords(listed.at(-1) ?? 0)];
  return `The tension of this set cannot be told: no weight is known for a ${construction} ${gaugeWords(gaugeThou)}. Those that were published run from ${lightest} to ${heaviest}; for others ask the strings’ maker.`;
}
