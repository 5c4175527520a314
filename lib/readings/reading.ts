import type { Measure } from '../craft/measure';

export type Air = { temperatureC: number; relativeHumidityPercent: number };

/** Wood room: air and, where taken, the wood itself. */
export type WoodRoomReading = Air & { kind: 'wood_room'; moisturePercent: number | null };

/** Finish: the air of the spray booth. */
export type BoothReading = Air & { kind: 'booth_air' };

/** Finish: one coat. Film thickness in micrometres; the dry film is computed from the wet one and the volume solids. */
export type CoatReading = {
  kind: 'coat';
  product: string;
  coatNumber: number;
  wetFilmUm: number | null;
  volumeSolidsPercent: number | null;
  dryFilmUm: number | null;
};

/** Finish: a colour measured against the approved sample. */
export type ColourReading = { kind: 'colour'; l: number; a: number; b: number; illuminant: 'D50' | 'D65' };

/** One measured length, angle or count, as typed: a scale, a nut width, a line of the set-up sheet by its key. */
export type MeasureReading = { kind: 'measure'; name: string; measured: Measure; setupLine?: string };

/** Sanding: the papers used, in order. */
export type AbrasiveReading = { kind: 'abrasives'; grades: string[] };

export type ReadingValue =
  WoodRoomReading | BoothReading | CoatReading | ColourReading | MeasureReading | AbrasiveReading;

/** A reading as it is taken: `itemKey` names the spec item it measures, null for one that measures none. */
export type NewReading = { value: ReadingValue; itemKey: string | null };

/** A reading in words, with the bar it is drawn as; the diary shows this and computes nothing. */
export type ShownReading = {
  kind: ReadingValue['kind'];
  /** What was measured. */
  label: string;
  /** The value, lengths in both unit systems. */
  figures: string;
  /** What follows from it, or how it stands to its tolerance; '' where there is nothing to say. */
  words: string;
  /** Null where it has no tolerance. */
  standing: 'within' | 'outside' | null;
  /** The tolerance and the value, all in one unit; a limit has no `low`. Null where there is nothing to draw. */
  bar: { low?: number; high: number; value: number; aim?: number } | null;
};
