import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { isRefused } from '@/lib/craft/doubt';
import {
  celsiusToFahrenheit,
  doubtHumidity,
  doubtMoisture,
  doubtTemperature,
  emcPercent,
  fahrenheitToCelsius,
  moistureWords,
  relativeHumidityFor,
} from '@/lib/craft/moisture';
import { byProvenance, cell } from '../../support/provenance';
import { readReference } from '../../support/reference';

const moistures = byProvenance(readReference('01_emc_wood'));
const inverses = byProvenance(readReference('01b_emc_inverse'));

function expectMoisture(row: Record<string, string>) {
  const found = emcPercent(cell(row, 'temperature_C'), cell(row, 'relative_humidity_pct'));
  expect(Math.abs(found - cell(row, 'expected_emc_pct'))).toBeLessThanOrEqual(cell(row, 'tolerance_pct_points'));
}

function expectHumidity(row: Record<string, string>) {
  const found = relativeHumidityFor(cell(row, 'target_mc_pct'), cell(row, 'temperature_C'));
  expect(Math.abs(found - cell(row, 'expected_relative_humidity_pct'))).toBeLessThanOrEqual(
    cell(row, 'tolerance_rh_points'),
  );
}

// Source: USDA FPL, Wood Handbook, FPL-GTR-282 (2021), Table 4-2 as transcribed in a public fact sheet, and the documented
// example of an R package (20 °C, 50 % -> 9.271141).
describe('equilibrium moisture content as published', () => {
  test('the tables have the outside rows they should', () => {
    expect([moistures.outside.length, inverses.outside.length]).toEqual([11, 7]);
  });
  test.each(moistures.outside)(
    '$temperature_C °C at $relative_humidity_pct % gives $expected_emc_pct %',
    expectMoisture,
  );
  test.each(inverses.outside)(
    '$target_mc_pct % at $temperature_C °C wants $expected_relative_humidity_pct %',
    expectHumidity,
  );
});

describe('equilibrium moisture content, rows without outside proof', () => {
  test.each(moistures.own)('$provenance: $temperature_C °C at $relative_humidity_pct %', expectMoisture);
  test.each(inverses.own)('$provenance: $target_mc_pct % at $temperature_C °C', expectHumidity);
});

describe('equilibrium moisture content', () => {
  const roomC = fc.double({ min: -10, max: 60, noNaN: true });
  const percent = fc.double({ min: 0, max: 100, noNaN: true });

  test('rises with humidity, so that its inverse is one number', () => {
    fc.assert(
      fc.property(roomC, percent, percent, (temperatureC, a, b) => {
        fc.pre(Math.abs(a - b) > 1e-6);
        const [low, high] = [Math.min(a, b), Math.max(a, b)];
        expect(emcPercent(temperatureC, low)).toBeLessThan(emcPercent(temperatureC, high));
      }),
    );
  });

  test('and its inverse undo each other', () => {
    fc.assert(
      fc.property(roomC, percent, (temperatureC, rh) => {
        expect(relativeHumidityFor(emcPercent(temperatureC, rh), temperatureC)).toBeCloseTo(rh, 6);
      }),
    );
  });

  test('takes Fahrenheit by conversion, within the tenth the Handbook prints', () => {
    expect(fahrenheitToCelsius(70)).toBeCloseTo(21.111, 3);
    expect(celsiusToFahrenheit(fahrenheitToCelsius(70))).toBeCloseTo(70, 9);
    for (const row of moistures.outside.filter((one) => one.temperature_F_table_heading)) {
      const temperatureC = fahrenheitToCelsius(cell(row, 'temperature_F_table_heading'));
      const found = emcPercent(temperatureC, cell(row, 'relative_humidity_pct'));
      expect(Math.abs(found - cell(row, 'expected_emc_pct'))).toBeLessThanOrEqual(0.1);
    }
  });

  test.each([
    [Number.NaN, 50],
    [20, Number.NaN],
    [20, -1],
    [20, 100.1],
    [Number.POSITIVE_INFINITY, 50],
  ])('is not computed for %d °C and %d %%', (temperatureC, rh) => {
    expect(() => emcPercent(temperatureC, rh)).toThrow(RangeError);
  });

  test.each([-1, 40, Number.NaN])('no humidity is given for a moisture of %d %%', (moisture) => {
    expect(() => relativeHumidityFor(moisture, 20)).toThrow(RangeError);
  });

  test('shows one decimal at most', () => expect(moistureWords(9.271141)).toBe('9.3 %'));
});

describe('what is typed in the wood room', () => {
  test('a humidity written as a share is refused with the figure that was meant', () => {
    const [doubt] = doubtHumidity(0.5);
    expect(doubt).toMatchObject({ kind: 'wrong', sentence: expect.stringContaining('write 50') });
  });

  test.each([-3, 101, Number.NaN])('a humidity of %d is refused', (rh) => {
    expect(isRefused(doubtHumidity(rh))).toBe(true);
  });

  test.each([3, 98])('a humidity of %d %% is beyond the table, and that is said', (rh) => {
    const doubts = doubtHumidity(rh);
    expect(isRefused(doubts)).toBe(false);
    expect(doubts[0]?.sentence).toContain('extrapolated');
  });

  test.each([5, 42, 95])('a humidity of %d %% needs no word', (rh) => expect(doubtHumidity(rh)).toEqual([]));

  test('70 °C is possible, so the unit is asked for, with what °F would be', () => {
    const doubts = doubtTemperature(70, 'C');
    expect(isRefused(doubts)).toBe(false);
    expect(doubts[0]?.sentence).toContain('21.1 °C');
  });

  test('20 °F is asked about, as it is 20 °C more likely', () => {
    expect(doubtTemperature(20, 'F')[0]?.sentence).toContain('choose °C');
  });

  test.each([
    [21, 'C'],
    [70, 'F'],
  ] as const)('%d °%s needs no word', (temperature, unit) => expect(doubtTemperature(temperature, unit)).toEqual([]));

  test.each([
    [-60, 'C'],
    [400, 'F'],
    [Number.NaN, 'C'],
  ] as const)('%d °%s is refused', (temperature, unit) => {
    expect(isRefused(doubtTemperature(temperature, unit))).toBe(true);
  });

  test('a temperature outside the table is said to be extrapolated', () => {
    expect(doubtTemperature(-10, 'C').some(({ sentence }) => sentence.includes('extrapolated'))).toBe(true);
  });

  test.each([-1, 0.08, 250, Number.NaN])('a moisture of %d %% is refused', (moisture) => {
    expect(isRefused(doubtMoisture(moisture))).toBe(true);
  });

  test('green wood is let through with a word', () => {
    expect(doubtMoisture(45)).toMatchObject([{ kind: 'ask' }]);
    expect(doubtMoisture(7.5)).toEqual([]);
  });
});
