import { fretPosition, multiscalePosition } from './frets';
import { MM_PER_INCH } from './units';

/** A board with one scale (both lengths equal) or two, bass and treble, that meet squarely at the perpendicular fret. */
export type ScalePlan = { bassScaleMm: number; trebleScaleMm: number; perpendicularFret: number; fretCount: number };

/** A place on one outer string: from that string's own nut, and along it from the perpendicular fret, positive to the bridge. */
export type SlotPlace = {
  fromNutMm: number;
  fromNutIn: number;
  fromPerpendicularMm: number;
  fromPerpendicularIn: number;
};

export type FretRow = {
  /** 0 is the nut. */
  fret: number | 'bridge';
  bass: SlotPlace;
  treble: SlotPlace;
  /** How far the bass end lies nearer the bridge than the treble end; 0 at the perpendicular fret. */
  skewMm: number;
  skewIn: number;
};

export type FretTable = ScalePlan & {
  isMultiscale: boolean;
  rows: FretRow[];
  /** A question to ask back about something legal but unusual, or null. */
  doubt: string | null;
};

const MOST_FRETS = 36;
const SCALE_LIMITS_MM = { low: 300, high: 1100 };

/**
 * Every slot of a board with the nut and the bridge, on both outer strings, in mm and inches. Twelve-tone equal temperament; two scales
 * as in `multiscalePosition`. Refused with a sentence when the plan cannot be cut.
 */
export function fretTable(plan: ScalePlan): { ok: true; table: FretTable } | { ok: false; message: string } {
  const message = planTrouble(plan);
  if (message) return { ok: false, message };
  const isMultiscale = plan.bassScaleMm !== plan.trebleScaleMm;
  const frets = Array.from({ length: plan.fretCount + 1 }, (_, fret) => fret);
  const rows = [...frets, 'bridge' as const].map((fret) => fretRow(plan, fret));
  const doubt =
    plan.bassScaleMm < plan.trebleScaleMm
      ? 'The bass scale is shorter than the treble scale. Was it meant the other way round?'
      : null;
  return { ok: true, table: { ...plan, isMultiscale, rows, doubt } };
}

function fretRow(plan: ScalePlan, fret: number | 'bridge'): FretRow {
  const bass = slotPlace(plan.bassScaleMm, fret, plan.perpendicularFret);
  const treble = slotPlace(plan.trebleScaleMm, fret, plan.perpendicularFret);
  const skewMm = bass.fromPerpendicularMm - treble.fromPerpendicularMm;
  return { fret, bass, treble, skewMm, skewIn: skewMm / MM_PER_INCH };
}

function slotPlace(scaleMm: number, fret: number | 'bridge', perpendicularFret: number): SlotPlace {
  const fromNutMm = fret === 'bridge' ? scaleMm : fretPosition(scaleMm, fret);
  const fromPerpendicularMm = multiscalePosition(scaleMm, fret, perpendicularFret);
  return {
    fromNutMm,
    fromNutIn: fromNutMm / MM_PER_INCH,
    fromPerpendicularMm,
    fromPerpendicularIn: fromPerpendicularMm / MM_PER_INCH,
  };
}

function planTrouble({ bassScaleMm, trebleScaleMm, perpendicularFret, fretCount }: ScalePlan): string | null {
  for (const scaleMm of [bassScaleMm, trebleScaleMm]) {
    if (!(scaleMm >= SCALE_LIMITS_MM.low && scaleMm <= SCALE_LIMITS_MM.high)) {
      return `A scale length lies between ${SCALE_LIMITS_MM.low} and ${SCALE_LIMITS_MM.high} mm. Look at the number and its unit.`;
    }
  }
  if (!Number.isInteger(fretCount) || fretCount < 1 || fretCount > MOST_FRETS) {
    return `Give the number of frets as a whole number from 1 to ${MOST_FRETS}.`;
  }
  if (!Number.isInteger(perpendicularFret) || perpendicularFret < 0 || perpendicularFret > fretCount) {
    return `The perpendicular fret must be on the board: a whole number from 0, the nut, to ${fretCount}.`;
  }
  return null;
}
