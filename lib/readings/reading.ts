import type { Measure } from '../craft/measure';

/** Wood room: air and, where taken, the wood itself. */
export type WoodRoomReading = {
  kind: 'wood_room';
  temperatureC: number;
  relativeHumidityPercent: number;
  moisturePercent: number | null;
};

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

/** One measured length, angle or count, as typed: a scale, a nut width, a line of the set-up sheet. */
export type MeasureReading = { kind: 'measure'; name: string; measured: Measure };

/** Sanding: the papers used, in order. */
export type AbrasiveReading = { kind: 'abrasives'; grades: string[] };

export type ReadingValue = WoodRoomReading | CoatReading | ColourReading | MeasureReading | AbrasiveReading;
