import type { Doubt } from '../craft/doubt';
import type { NewReading, ShownReading } from './reading';

/** The readings of an entry as their fields hold them: text, so that nothing typed is lost. */
export type TypedReadings = {
  temperature: string;
  temperatureUnit: 'C' | 'F';
  humidity: string;
  moisture: string;
  product: string;
  coatNumber: string;
  wetFilm: string;
  volumeSolids: string;
  dryFilm: string;
  l: string;
  a: string;
  b: string;
  illuminant: 'D50' | 'D65';
  /** The item whose colour was read, where the spec has several; '' is the first. */
  colourItem: string;
  papers: string;
  /** By the key of the line they stand on. */
  measures: Record<string, string>;
};

export const nothingTyped: TypedReadings = {
  temperature: '',
  temperatureUnit: 'C',
  humidity: '',
  moisture: '',
  product: '',
  coatNumber: '',
  wetFilm: '',
  volumeSolids: '',
  dryFilm: '',
  l: '',
  a: '',
  b: '',
  illuminant: 'D65',
  colourItem: '',
  papers: '',
  measures: {},
};

/** The chosen units alone say nothing. */
export function isBlankTyped({
  measures,
  temperatureUnit: _unit,
  illuminant: _white,
  colourItem: _item,
  ...texts
}: TypedReadings) {
  return [...Object.values(texts), ...Object.values(measures)].every((text) => text.trim() === '');
}

/** What is to be said at a field, by its name. */
export type FieldDoubts = Record<string, Doubt>;

/** What became of the fields of one kind of reading. */
export type PartRead = {
  reading: NewReading | null;
  shown: ShownReading | null;
  doubts: FieldDoubts;
  /** Sentences for fields that the others need and that are still empty: said when the entry is posted, not while one types. */
  missing: Record<string, string>;
};

export const nothingRead: PartRead = { reading: null, shown: null, doubts: {}, missing: {} };

/** Fields left out because nothing is odd about them do not appear. */
export function fieldDoubts(found: Record<string, Doubt | null | undefined>): FieldDoubts {
  return Object.fromEntries(Object.entries(found).flatMap(([field, doubt]) => (doubt ? [[field, doubt]] : [])));
}

/** The most telling of several: what is refused comes before what is questioned. */
export const worstOf = (doubts: Doubt[]): Doubt | null =>
  doubts.find(({ kind }) => kind === 'wrong') ?? doubts[0] ?? null;
