import { describe, expect, test } from 'vitest';
import { lineOfItem, showLine } from '@/lib/readings/measure-line';
import { mailedReading, type Units } from '@/lib/readings/mailed-reading';
import { showCoat } from '@/lib/readings/coat';
import type { MeasureReading } from '@/lib/readings/reading';
import { showWoodRoom } from '@/lib/readings/wood-room';
import { readReference } from '../../support/reference';
import { measureItem } from '../../support/spec';

const nut = (text: string): MeasureReading => ({ kind: 'measure', name: 'Nut width', measured: { text, unit: 'in' } });
const mailedNut = (text: string, units: Units) =>
  mailedReading(nut(text), showLine(nut(text), lineOfItem(measureItem())), units);

describe('a length', () => {
  test('is told in the unit of its reader alone, however it was typed', () => {
    expect(mailedNut('1.687', 'in')).toBe('Nut width: 1.687 in, outside its tolerance');
    expect(mailedNut('1.700', 'mm')).toBe('Nut width: 43.18 mm, within its tolerance');
    const typedInMm = { kind: 'measure', name: 'Relief', measured: { text: '0.254', unit: 'mm' } } as const;
    expect(mailedReading(typedInMm, showLine(typedInMm, null), 'in')).toBe('Relief: 0.010 in');
  });

  // 05b_length_units.csv: conversions by the international inch of 1959, rounded to a thousandth of a millimetre.
  const thou = readReference('05b_length_units').filter(({ unit }) => unit === 'thousandths of an inch');
  test.each(thou)('of $value thou is $expected_mm mm to one reader and $expected_in in to another', (row) => {
    const value: MeasureReading = {
      kind: 'measure',
      name: 'Relief',
      measured: { text: row.value ?? '', unit: 'thou' },
    };
    const told = (units: Units) => Number.parseFloat(mailedReading(value, showLine(value, null), units).slice(8));
    expect(told('mm')).toBeCloseTo(Number(row.expected_mm), 3);
    expect(told('in')).toBeCloseTo(Number(row.expected_in), 4);
  });
});

describe('what is no length', () => {
  test('of a coat is told in micrometres or mils', () => {
    const coat = {
      kind: 'coat',
      product: 'clear lacquer',
      coatNumber: 3,
      wetFilmUm: 127,
      volumeSolidsPercent: 40,
      dryFilmUm: null,
    } as const;
    expect(mailedReading(coat, showCoat(coat, []), 'mm')).toBe('Coat 3, clear lacquer: 51 µm dry');
    expect(mailedReading(coat, showCoat(coat, []), 'in')).toBe('Coat 3, clear lacquer: 2 mil dry');
  });

  test('of a wood room is told in the degrees that go with the unit', () => {
    const room = {
      kind: 'wood_room',
      temperatureC: 21,
      relativeHumidityPercent: 45,
      moisturePercent: null,
    } as const;
    expect(mailedReading(room, showWoodRoom(room), 'mm')).toBe('Wood room: 21 °C, 45 %');
    expect(mailedReading(room, showWoodRoom(room), 'in')).toBe('Wood room: 70 °F, 45 %');
  });
});
