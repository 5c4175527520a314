import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  coverageSqFtPerUsGallon,
  coverageSqMPerLitre,
  doubtCoat,
  dryFilm,
  filmBuild,
  filmWords,
  UM_PER_MIL,
} from '@/lib/craft/film';
import {
  coatMaterials,
  finishWindows,
  materialOf,
  windowsOf,
  windowState,
  type FinishWindow,
} from '@/lib/craft/finish-windows';
import { byProvenance, cell } from '../../support/provenance';
import { readReference } from '../../support/reference';

const films = readReference('07b_film_build');
const coverages = readReference('07c_coverage');
const windows = readReference('07_finish_windows_defaults');

// By definition of volume solids and of the US gallon (231 cubic inches); no row has outside proof.
test('none of the finish tables claims outside proof', () => {
  expect([films, coverages, windows].map((rows) => byProvenance(rows).outside.length)).toEqual([0, 0, 0]);
});

test.each(films)(
  '$provenance: $wet_film_thickness_mil mil at $volume_solids_pct % dry to $expected_dry_film_thickness_mil',
  (row) => {
    const found = dryFilm(cell(row, 'wet_film_thickness_mil'), cell(row, 'volume_solids_pct'));
    expect(Math.abs(found - cell(row, 'expected_dry_film_thickness_mil'))).toBeLessThanOrEqual(
      cell(row, 'tolerance_mil'),
    );
  },
);

test.each(coverages)(
  '$provenance: $volume_solids_pct % at $dry_film_mil mil covers $expected_sqft_per_us_gal sq ft',
  (row) => {
    const found = coverageSqFtPerUsGallon(cell(row, 'volume_solids_pct'), cell(row, 'dry_film_mil'));
    expect(Math.abs(found - cell(row, 'expected_sqft_per_us_gal'))).toBeLessThanOrEqual(cell(row, 'tolerance'));
  },
);

describe('coverage', () => {
  test('is the same in metric and US measures', () => {
    const solids = fc.double({ min: 1, max: 100, noNaN: true });
    const filmMil = fc.double({ min: 0.1, max: 20, noNaN: true });
    fc.assert(
      fc.property(solids, filmMil, (percent, mil) => {
        const sqFtPerGallon = coverageSqMPerLitre(percent, mil * UM_PER_MIL) * (3.785411784 / 0.09290304);
        expect(sqFtPerGallon / coverageSqFtPerUsGallon(percent, mil)).toBeCloseTo(1, 9);
      }),
    );
  });

  test.each([
    [0, 1],
    [101, 1],
    [50, 0],
    [Number.NaN, 1],
  ])('is not computed for %d %% and a film of %d', (percent, film) => {
    expect(() => coverageSqFtPerUsGallon(percent, film)).toThrow(RangeError);
    expect(() => coverageSqMPerLitre(percent, film)).toThrow(RangeError);
  });
});

describe('the build of a finish', () => {
  const coat = { wetFilmUm: 150, volumeSolidsPercent: 30, dryFilmUm: null };

  test('is the sum of its coats, a measured film before a computed one', () => {
    const build = filmBuild([coat, coat, { ...coat, dryFilmUm: 40 }]);
    expect(build).toEqual({ perCoatUm: [45, 45, 40], totalUm: 130, unknownCoats: 0 });
  });

  test('says how many coats it does not know', () => {
    const build = filmBuild([coat, { wetFilmUm: 150, volumeSolidsPercent: null, dryFilmUm: null }]);
    expect(build).toEqual({ perCoatUm: [45, null], totalUm: 45, unknownCoats: 1 });
  });

  test('is said in both units', () => expect(filmWords(45)).toBe('45 µm (1.8 mil)'));

  test.each([
    [-1, 30],
    [100, 0],
    [100, 130],
    [Number.NaN, 30],
  ])('is not computed from %d µm at %d %%', (wet, percent) => expect(() => dryFilm(wet, percent)).toThrow(RangeError));
});

describe('a coat as typed', () => {
  const coat = { wetFilmUm: 150, volumeSolidsPercent: 30, dryFilmUm: 45 };

  test('a usual one needs no word, nor does an empty one', () => {
    expect(doubtCoat(coat)).toEqual({});
    expect(doubtCoat({ wetFilmUm: null, volumeSolidsPercent: null, dryFilmUm: null })).toEqual({});
  });

  test('solids written as a share are refused with the figure that was meant', () => {
    expect(doubtCoat({ ...coat, volumeSolidsPercent: 0.3 }).volumeSolidsPercent?.sentence).toContain('write 30');
  });

  test('a wet film of 6 asks whether mils are meant', () => {
    const { wetFilmUm } = doubtCoat({ ...coat, wetFilmUm: 6, dryFilmUm: null });
    expect(wetFilmUm).toMatchObject({ kind: 'ask', sentence: expect.stringContaining('152 µm') });
  });

  test('a dry film thicker than the wet one is refused', () => {
    expect(doubtCoat({ ...coat, dryFilmUm: 160 }).dryFilmUm?.kind).toBe('wrong');
  });

  test.each([0, -5, Number.NaN, 5000])('a film of %d µm is refused', (um) => {
    expect(doubtCoat({ ...coat, wetFilmUm: um, dryFilmUm: null }).wetFilmUm?.kind).toBe('wrong');
  });
});

describe('finish windows', () => {
  test('are the placeholders of the table, each marked as one', () => {
    expect(finishWindows.every(({ isPlaceholder }) => isPlaceholder)).toBe(true);
    expect(finishWindows.map(({ material, step, least, most, unit }) => [material, step, least, most, unit])).toEqual(
      windows.map((row) => [row.material, row.step, cell(row, 'default_min'), cell(row, 'default_max'), row.unit]),
    );
  });

  const hour = 3_600_000;
  const window: FinishWindow = {
    material: 'clear',
    step: 'recoat',
    least: 1,
    most: 4,
    unit: 'hours',
    isPlaceholder: false,
  };

  test.each([
    [0, 'too_soon', 'Opens in 1 hour.'],
    [hour - 1, 'too_soon', 'Opens in 1 hour.'],
    [hour, 'open', 'Open for 3 hours more.'],
    [hour + 1, 'open', 'Open for 2 hours more.'],
    [4 * hour - 1, 'open', 'Open for less than 1 hour more.'],
    [4 * hour, 'past', 'The window is past. See the data sheet before going on.'],
  ])('%d ms after the last coat it is %s', (sinceMs, state, words) => {
    expect(windowState(window, 1_000, 1_000 + sinceMs)).toMatchObject({ state, words });
  });

  test('that count coats have no clock', () => expect(windowState({ ...window, unit: 'coats' }, 0, 0)).toBeNull());
});

describe('what is on a can', () => {
  test.each([
    ['Clear lacquer, nitro', 'nitrocellulose lacquer'],
    ['Water-borne clear lacquer', 'water-borne clear'],
    ['2K polyurethane', 'polyurethane (2K), clear'],
    ['Polyester 2K filler', 'polyester (2K) base'],
    ['Tung oil', 'oil finish'],
    ['Tinted toner', null],
  ])('%s is told as %s', (product, material) => expect(materialOf(product)).toBe(material));

  test.each(coatMaterials)('%s has windows to wait for, each a placeholder', (material) => {
    const windows = windowsOf(material);
    expect(windows.length).toBeGreaterThan(0);
    expect(windows.every(({ isPlaceholder }) => isPlaceholder)).toBe(true);
  });
});
