import { isRefused, wrong, type Doubt } from '../craft/doubt';
import {
  coatDryFilmUm,
  coverageSqFtPerUsGallon,
  coverageSqMPerLitre,
  doubtCoat,
  filmBuild,
  filmWords,
  UM_PER_MIL,
} from '../craft/film';
import { figure } from '../craft/figure';
import { readNumberField } from './number-field';
import type { CoatReading, ShownReading } from './reading';
import { fieldDoubts, nothingRead, type PartRead, type TypedReadings } from './typed';

const MOST_COATS = 40;

type Parts = Pick<TypedReadings, 'product' | 'coatNumber' | 'wetFilm' | 'volumeSolids' | 'dryFilm'>;

/** A coat from its fields, and what the film comes to with the coats before it. */
export function readCoat(typed: Parts, before: CoatReading[]): PartRead {
  if (Object.values(pickTexts(typed)).every((text) => text.trim() === '')) return nothingRead;
  const film = { units: ['µm', 'um', 'μm', 'micron', 'microns'] };
  const read = {
    coatNumber: readNumberField(typed.coatNumber, []),
    wetFilm: readNumberField(typed.wetFilm, film.units),
    volumeSolids: readNumberField(typed.volumeSolids, ['%']),
    dryFilm: readNumberField(typed.dryFilm, film.units),
  };
  const measured = {
    wetFilmUm: read.wetFilm.value,
    volumeSolidsPercent: read.volumeSolids.value,
    dryFilmUm: read.dryFilm.value,
  };
  const odd = doubtCoat(measured);
  const coatNumber = read.coatNumber.value;
  const doubts = fieldDoubts({
    coatNumber: read.coatNumber.doubt ?? (coatNumber === null ? null : doubtCoatNumber(coatNumber)),
    wetFilm: read.wetFilm.doubt ?? odd.wetFilmUm,
    volumeSolids: read.volumeSolids.doubt ?? odd.volumeSolidsPercent,
    dryFilm: read.dryFilm.doubt ?? odd.dryFilmUm,
  });
  const missing = {
    ...(typed.product.trim() === '' && { product: 'Write what was put on, as its can is labelled.' }),
    ...(typed.coatNumber.trim() === '' && { coatNumber: 'Write which coat this is, such as 3.' }),
  };
  if (isRefused(Object.values(doubts)) || coatNumber === null || typed.product.trim() === '')
    return { reading: null, shown: null, doubts, missing };
  const value: CoatReading = { kind: 'coat', product: typed.product.trim(), coatNumber, ...measured };
  return { reading: { value, itemKey: null }, shown: showCoat(value, before), doubts, missing };
}

const pickTexts = ({ product, coatNumber, wetFilm, volumeSolids, dryFilm }: Parts) => ({
  product,
  coatNumber,
  wetFilm,
  volumeSolids,
  dryFilm,
});

function doubtCoatNumber(coatNumber: number): Doubt | null {
  if (Number.isInteger(coatNumber) && coatNumber >= 1 && coatNumber <= MOST_COATS) return null;
  return wrong(`Coats are counted from 1 to ${MOST_COATS} in whole numbers. Look at the number again.`);
}

/** Why a coat cannot be meant, or null. */
export function coatTrouble({ coatNumber, ...coat }: CoatReading): string | null {
  const doubts = [doubtCoatNumber(coatNumber), ...Object.values(doubtCoat(filmOf(coat)))];
  return doubts.find((doubt) => doubt?.kind === 'wrong')?.sentence ?? null;
}

const filmOf = ({ wetFilmUm, volumeSolidsPercent, dryFilmUm }: Omit<CoatReading, 'coatNumber'>) => ({
  wetFilmUm,
  volumeSolidsPercent,
  dryFilmUm,
});

/** "Coat 3, clear lacquer: 45 µm (1.8 mil) dry", and what the coats come to. @throws RangeError as `filmBuild` */
export function showCoat(value: CoatReading, before: CoatReading[]): ShownReading {
  const dryUm = coatDryFilmUm(value);
  const wet = value.wetFilmUm === null ? '' : `${figure(value.wetFilmUm, 0)} µm wet`;
  return {
    kind: 'coat',
    label: `Coat ${value.coatNumber}, ${value.product}`,
    figures: dryUm === null ? wet || 'film not measured' : `${filmWords(dryUm)} dry`,
    words: buildWords([...before, value]),
    standing: null,
    bar: null,
  };
}

/** How far the product goes at the film of this coat; null where film or solids are not known. Nothing lost in spraying. */
export function coverageWords(coat: CoatReading): string | null {
  const [dryUm, solids] = [coatDryFilmUm(coat), coat.volumeSolidsPercent];
  if (dryUm === null || solids === null || !(dryUm > 0)) return null;
  const sqM = figure(coverageSqMPerLitre(solids, dryUm), 1);
  const sqFt = figure(coverageSqFtPerUsGallon(solids, dryUm / UM_PER_MIL), 0);
  return `At this film a litre covers ${sqM} m², a US gallon ${sqFt} sq ft, with nothing lost.`;
}

function buildWords(coats: CoatReading[]): string {
  if (coats.length < 2) return '';
  const { totalUm, unknownCoats } = filmBuild(coats);
  const without = unknownCoats === 0 ? '' : `, ${unknownCoats} of them without figures`;
  return `the ${coats.length} coats written down make ${filmWords(totalUm)}${without}`;
}
