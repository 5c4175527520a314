import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { materialRows, movementOf, starterMaterials } from '@/lib/craft/materials';
import { changeByCoefficient, changeByShrinkage, expectedMovement, shrinkageFor } from '@/lib/craft/movement';
import { byProvenance, cell } from '../../support/provenance';
import { readReference } from '../../support/reference';

const small = byProvenance(readReference('02b_dimensional_change_small'));
const large = readReference('02c_dimensional_change_large');
const coefficients = readReference('02_dimensional_change_coefficients');
const published = byProvenance(coefficients, 'provenance_of_C');

const material = (key: string) => {
  const found = starterMaterials.find((one) => one.key === key)?.movement;
  if (!found) throw new Error(`no movement for ${key}`);
  return found;
};

function expectSmall(row: Record<string, string>) {
  const step = {
    dimension: cell(row, 'initial_dimension'),
    fromPercent: cell(row, 'mc_initial_pct'),
    toPercent: cell(row, 'mc_final_pct'),
  };
  const change = changeByCoefficient(step, cell(row, 'coefficient_per_pct_mc'));
  expect(Math.abs(change - cell(row, 'expected_change'))).toBeLessThanOrEqual(cell(row, 'tolerance'));
}

// Source: USDA FPL, Wood Handbook, FPL-GTR-190 (2010), worked example after Eq. (13-2); a woodworking magazine; a flooring
// trade's stability chart.
test.each(small.outside)('$initial_dimension $unit move by $expected_change as published ($id)', expectSmall);
test.each(small.own)('$provenance: $id moves by $expected_change', expectSmall);

// Eq. (13-3) from the same chapter: computed rows, some from shrinkages that were read there.
test.each(large)('$provenance: $case moves by $expected_change_mm mm', (row) => {
  const step = {
    dimension: cell(row, 'initial_dimension_mm'),
    fromPercent: cell(row, 'mc_initial_pct'),
    toPercent: cell(row, 'mc_final_pct'),
  };
  const change = changeByShrinkage(step, cell(row, 'shrinkage_green_to_ovendry_pct'));
  expect(Math.abs(change - cell(row, 'expected_change_mm'))).toBeLessThanOrEqual(cell(row, 'tolerance_mm'));
});

describe('the coefficients of the Wood Handbook, Table 13-5', () => {
  const withShrinkage = published.outside.filter((row) => row.shrinkage_S_R_green_to_ovendry_pct !== '');

  test('come to 21 rows read there', () => expect(published.outside).toHaveLength(21));

  test.each(withShrinkage)('agree with the shrinkage of $species where the two forms meet', (row) => {
    const radial = shrinkageFor(cell(row, 'C_R_radial_per_pct_mc'));
    const tangential = shrinkageFor(cell(row, 'C_T_tangential_per_pct_mc'));
    // The coefficients are printed to 0.00001, which is up to 0.02 of a percent of shrinkage.
    expect(Math.abs(radial - cell(row, 'shrinkage_S_R_green_to_ovendry_pct'))).toBeLessThanOrEqual(0.02);
    expect(Math.abs(tangential - cell(row, 'shrinkage_S_T_green_to_ovendry_pct'))).toBeLessThanOrEqual(0.02);
  });

  const listed = starterMaterials.filter(({ movement }) => movement !== null);
  test.each(listed)('are those of $name in the shop list, with their provenance', ({ name, movement }) => {
    const row = coefficients.find(({ species }) => species === name);
    expect(row).toBeDefined();
    expect(movement?.radial.coefficientPerPercent).toBe(Number(row?.C_R_radial_per_pct_mc));
    expect(movement?.tangential.coefficientPerPercent).toBe(Number(row?.C_T_tangential_per_pct_mc));
    expect(movement?.coefficientProvenance).toBe(row?.provenance_of_C);
  });
});

describe('expected movement', () => {
  test('of maple within 6 to 14 % is by the coefficient and not marked', () => {
    const step = { dimension: 14, fromPercent: 6, toPercent: 10 };
    const found = expectedMovement(material('sugar_maple'), 'tangential', step);
    expect(found?.change).toBeCloseTo(0.19768, 9);
    expect(found?.isApproximate).toBe(false);
  });

  test('of mahogany is by the shrinkages that were read, not by the recalled coefficient', () => {
    const step = { dimension: 330, fromPercent: 12, toPercent: 7 };
    const found = expectedMovement(material('mahogany'), 'tangential', step);
    expect(found?.change).toBeCloseTo(-2.311872, 5);
    expect(found?.isApproximate).toBe(false);
  });

  test('of a wood known from memory alone is marked approximate', () => {
    const step = { dimension: 330, fromPercent: 7, toPercent: 12 };
    expect(expectedMovement(material('spanish_cedar'), 'radial', step)?.isApproximate).toBe(true);
  });

  test('of a recalled shrinkage, outside 6 to 14 %, is marked approximate', () => {
    const step = { dimension: 330, fromPercent: 25, toPercent: 8 };
    expect(expectedMovement(material('sugar_maple'), 'radial', step)?.isApproximate).toBe(true);
  });

  test('of a wood without figures is none, not zero', () => {
    expect(expectedMovement(null, 'radial', { dimension: 10, fromPercent: 8, toPercent: 9 })).toBeNull();
  });

  test('counts moisture above 30 % as 30 %', () => {
    const at = (fromPercent: number) => changeByShrinkage({ dimension: 100, fromPercent, toPercent: 8 }, 8);
    expect(at(60)).toBe(at(30));
  });

  test('by a coefficient and by the shrinkage worked out from it are the same step at 10 %', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.0005, max: 0.006, noNaN: true }), (coefficient) => {
        const step = { dimension: 1, fromPercent: 10, toPercent: 10.5 };
        expect(changeByShrinkage(step, shrinkageFor(coefficient))).toBeCloseTo(
          changeByCoefficient(step, coefficient),
          9,
        );
      }),
    );
  });

  test('there and back again leaves a board as wide as it was', () => {
    const moisture = fc.double({ min: 0, max: 30, noNaN: true });
    fc.assert(
      fc.property(moisture, moisture, fc.double({ min: 1, max: 15, noNaN: true }), (a, b, shrinkage) => {
        const out = changeByShrinkage({ dimension: 100, fromPercent: a, toPercent: b }, shrinkage);
        const back = changeByShrinkage({ dimension: 100 + out, fromPercent: b, toPercent: a }, shrinkage);
        expect(out + back).toBeCloseTo(0, 9);
      }),
    );
  });

  test.each([
    { dimension: 0, fromPercent: 8, toPercent: 9 },
    { dimension: 10, fromPercent: -1, toPercent: 9 },
    { dimension: 10, fromPercent: 8, toPercent: Number.NaN },
  ])('$dimension wide from $fromPercent to $toPercent % is refused', (step) => {
    expect(() => changeByCoefficient(step, 0.002)).toThrow(RangeError);
  });

  test.each([0, -4, 100, Number.NaN])('a shrinkage of %d %% is refused', (shrinkage) => {
    expect(() => changeByShrinkage({ dimension: 10, fromPercent: 8, toPercent: 9 }, shrinkage)).toThrow(RangeError);
  });
});

describe('the shop list of materials', () => {
  test('names each material once', () => {
    expect(new Set(starterMaterials.map(({ key }) => key)).size).toBe(starterMaterials.length);
  });

  test('gives every row its movement back from the table', () => {
    materialRows().forEach((row, index) => expect(movementOf(row)).toEqual(starterMaterials[index]?.movement));
  });

  test('a figure the shop has changed is no longer said to be published', () => {
    const changed = movementOf({ key: 'sugar_maple', radialCoefficient: 0.002, tangentialCoefficient: 0.004 });
    expect(changed?.coefficientProvenance).toBe('memory');
    expect(changed?.radial.shrinkagePercent).toBeNull();
  });
});
