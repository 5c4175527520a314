import { ask, wrong, type Doubt } from './doubt';
import { figure } from './figure';

export const UM_PER_MIL = 25.4;

/** 231 cubic inches over 144 square inches of 0.001 in: square feet a US gallon covers at 1 mil. */
const SQ_FT_MIL_PER_US_GALLON = 231 / (144 * 0.001);

function requireSolids(volumeSolidsPercent: number): void {
  if (!(volumeSolidsPercent > 0 && volumeSolidsPercent <= 100)) {
    throw new RangeError(`Volume solids run from above 0 to 100 %; got ${volumeSolidsPercent}.`);
  }
}

/**
 * Dry film that a wet film leaves, in the unit of `wetFilm`: wet film x volume solids / 100, by definition of volume solids
 * (terms as in ISO 2808).
 * @throws RangeError when the film is negative or the solids are not above 0 and at most 100 %
 */
export function dryFilm(wetFilm: number, volumeSolidsPercent: number): number {
  if (!(wetFilm >= 0 && Number.isFinite(wetFilm))) throw new RangeError(`A wet film is at least 0; got ${wetFilm}.`);
  requireSolids(volumeSolidsPercent);
  return (wetFilm * volumeSolidsPercent) / 100;
}

/** One coat; `dryFilmUm` is a measured one and wins over what wet film and solids give. */
export type Coat = { wetFilmUm: number | null; volumeSolidsPercent: number | null; dryFilmUm: number | null };

/** Dry film of one coat in micrometres; null when neither measured nor computable. @throws RangeError as `dryFilm` */
export function coatDryFilmUm({ wetFilmUm, volumeSolidsPercent, dryFilmUm }: Coat): number | null {
  if (dryFilmUm !== null) return dryFilmUm;
  return wetFilmUm === null || volumeSolidsPercent === null ? null : dryFilm(wetFilmUm, volumeSolidsPercent);
}

/**
 * What the coats build up to, in micrometres. A coat without figures adds nothing and is counted in `unknownCoats`, so that a
 * total is never shown as whole when it is not. Sanding between coats is not in it.
 * @throws RangeError as `dryFilm`
 */
export function filmBuild(coats: Coat[]): { perCoatUm: (number | null)[]; totalUm: number; unknownCoats: number } {
  const perCoatUm = coats.map(coatDryFilmUm);
  const known = perCoatUm.filter((um) => um !== null);
  return {
    perCoatUm,
    totalUm: known.reduce((total, um) => total + um, 0),
    unknownCoats: perCoatUm.length - known.length,
  };
}

/**
 * Square feet that one US gallon covers, nothing lost: 1604.17 x solids / dry film in mils (231 cubic inches a gallon).
 * @throws RangeError when the film is not above 0 or the solids are not above 0 and at most 100 %
 */
export function coverageSqFtPerUsGallon(volumeSolidsPercent: number, dryFilmMil: number): number {
  requireSolids(volumeSolidsPercent);
  if (!(dryFilmMil > 0 && Number.isFinite(dryFilmMil))) throw new RangeError(`A film is above 0; got ${dryFilmMil}.`);
  return (SQ_FT_MIL_PER_US_GALLON * volumeSolidsPercent) / 100 / dryFilmMil;
}

/** Square metres that one litre covers, nothing lost: 10 x solids in percent / dry film in micrometres. @throws RangeError as above */
export function coverageSqMPerLitre(volumeSolidsPercent: number, dryFilmUm: number): number {
  requireSolids(volumeSolidsPercent);
  if (!(dryFilmUm > 0 && Number.isFinite(dryFilmUm))) throw new RangeError(`A film is above 0; got ${dryFilmUm}.`);
  return (10 * volumeSolidsPercent) / dryFilmUm;
}

/** "45 µm (1.8 mil)" */
export const filmWords = (filmUm: number) => `${figure(filmUm, 0)} µm (${figure(filmUm / UM_PER_MIL, 1)} mil)`;

/** What is odd about the figures of one coat, a field at a time. */
export function doubtCoat(coat: Coat): Partial<Record<keyof Coat, Doubt>> {
  const found = {
    wetFilmUm: coat.wetFilmUm === null ? null : doubtFilm(coat.wetFilmUm, 'wet'),
    volumeSolidsPercent: coat.volumeSolidsPercent === null ? null : doubtSolids(coat.volumeSolidsPercent),
    dryFilmUm: coat.dryFilmUm === null ? null : doubtFilm(coat.dryFilmUm, 'dry', coat.wetFilmUm),
  };
  return Object.fromEntries(Object.entries(found).filter(([, doubt]) => doubt !== null));
}

function doubtFilm(filmUm: number, which: 'wet' | 'dry', wetFilmUm: number | null = null): Doubt | null {
  if (!(filmUm > 0)) return wrong(`Write the ${which} film in micrometres, above 0.`);
  if (filmUm > 2000) return wrong(`${figure(filmUm, 0)} µm is no single coat. Check the figure and its unit.`);
  if (wetFilmUm !== null && filmUm > wetFilmUm)
    return wrong('A dry film cannot be thicker than the wet one it came from.');
  if (which === 'wet' && filmUm < 10) {
    const asMil = figure(filmUm * UM_PER_MIL, 0);
    return ask(`${figure(filmUm, 1)} µm is very thin. If ${figure(filmUm, 1)} mil is meant, write ${asMil} µm.`);
  }
  return null;
}

function doubtSolids(percent: number): Doubt | null {
  if (!(percent > 0 && percent <= 100)) return wrong('Volume solids run from above 0 to 100 %. See the data sheet.');
  if (percent >= 1) return null;
  const meant = figure(percent * 100, 1);
  return wrong(`${figure(percent, 3)} is less than one percent. If ${meant} % is meant, write ${meant}.`);
}
