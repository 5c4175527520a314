import { describe, expect, test } from 'vitest';
import { nothingTyped } from '@/lib/readings/typed';
import { holdingWords, readWoodRoom, showWoodRoom, woodRoomTrouble } from '@/lib/readings/wood-room';
import { byProvenance, cell } from '../../support/provenance';
import { readReference } from '../../support/reference';

const typed = (over: Partial<typeof nothingTyped>) => readWoodRoom({ ...nothingTyped, ...over });
const air = (temperatureC: number, relativeHumidityPercent: number, moisturePercent: number | null = null) =>
  ({ kind: 'wood_room', temperatureC, relativeHumidityPercent, moisturePercent }) as const;

describe('what cannot be meant is refused with a sentence at its field', () => {
  test.each([
    { what: 'a relative humidity of 0.5', over: { humidity: '0.5' }, field: 'humidity', says: /write 50/ },
    { what: '70 °C, which is a thermometer in °F', over: { temperature: '70' }, field: 'temperature', says: /°F/ },
    { what: 'a humidity above 100 %', over: { humidity: '120' }, field: 'humidity', says: /0 to 100/ },
    { what: 'a humidity below 0', over: { humidity: '-4' }, field: 'humidity', says: /0 to 100/ },
    { what: 'no number', over: { temperature: 'warm' }, field: 'temperature', says: /not a number/ },
    { what: 'another unit', over: { humidity: '45 g' }, field: 'humidity', says: /not the unit/ },
    { what: 'less than one percent of moisture', over: { moisture: '0.08' }, field: 'moisture', says: /write 8/ },
  ])('$what', ({ over, field, says }) => {
    const read = typed({ temperature: '21', humidity: '45', ...over });
    expect(read.reading).toBeNull();
    expect(read.doubts[field]).toMatchObject({ kind: 'wrong', sentence: expect.stringMatching(says) });
  });

  test('by the shop too, whatever a page let through', () => {
    expect(woodRoomTrouble(air(21, 0.5))).toMatch(/write 50/);
    expect(woodRoomTrouble(air(70, 45))).toMatch(/°F/);
    expect(woodRoomTrouble(air(21, 45, 8.4))).toBeNull();
  });
});

test('a unit typed behind the temperature wins over the one that is chosen', () => {
  const read = typed({ temperature: '70 F', temperatureUnit: 'C', humidity: '45 %' });
  expect(read.doubts).toEqual({});
  expect(read.reading?.value).toEqual(air(21.11, 45));
});

test('one figure alone is no reading yet, and which one is missing is known', () => {
  const read = typed({ moisture: '8.4' });
  expect(read.reading).toBeNull();
  expect(read.doubts).toEqual({});
  expect(Object.keys(read.missing)).toEqual(['temperature', 'humidity']);
  expect(typed({})).toMatchObject({ reading: null, missing: {} });
});

// USDA Wood Handbook FPL-GTR-282, Table 4-2, as tests/reference gives it.
test.each(byProvenance(readReference('01_emc_wood')).outside)(
  'what the reader is told of $temperature_C °C and $relative_humidity_pct % is what the Handbook says: $expected_emc_pct %',
  (row) => {
    const { words } = showWoodRoom(air(cell(row, 'temperature_C'), cell(row, 'relative_humidity_pct')));
    const told = Number(/settle at ([\d.]+) %/.exec(words)?.[1]);
    expect(Math.abs(told - cell(row, 'expected_emc_pct'))).toBeLessThan(0.11);
  },
);

describe('the air that holds the wood', () => {
  // USDA Wood Handbook FPL-GTR-282, Eq. (4-5), as tests/reference gives its inverse.
  test.each(byProvenance(readReference('01b_emc_inverse')).outside)(
    'holds $target_mc_pct % at $temperature_C °C',
    (row) => {
      const [temperature, moisture] = [cell(row, 'temperature_C'), cell(row, 'target_mc_pct')];
      const humidity = /kept at ([\d.]+) %/.exec(holdingWords(air(temperature, 45, moisture), null) ?? '')?.[1];
      expect(Math.abs(Number(humidity) - cell(row, 'expected_relative_humidity_pct'))).toBeLessThanOrEqual(0.56);
    },
  );

  test('is that of the moisture the spec asks for, where it does', () => {
    expect(holdingWords(air(21, 45, 10.8), 8)).toMatch(/the wood comes to 8 % in air that is kept at 4\d % humidity/);
  });

  test('is not told without a moisture, nor of one that no air gives', () => {
    expect(holdingWords(air(21, 45), null)).toBeNull();
    expect(holdingWords(air(21, 45, 60), null)).toBeNull();
    expect(holdingWords(air(21, 45, 0), null)).toBeNull();
  });
});
