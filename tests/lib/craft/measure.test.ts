import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { inUnit, lengthWords, readMeasure, readTolerance, verdict } from '@/lib/craft/measure';
import type { LengthUnit, Measure, Quantity, ShownUnit, Unit } from '@/lib/craft/measure';
import { readReference } from '../../support/reference';

const lengthUnits: LengthUnit[] = ['in', 'mm', 'thou', '64ths'];

/** The value and its unit as the reference table words it. */
function referenceMeasure(row: Record<string, string>): Measure {
  const unit: Unit = row.unit === 'thousandths of an inch' ? 'thou' : 'in';
  return { text: row.value ?? '', unit };
}

function message(text: string, unit: Unit | '', quantity?: Quantity): string {
  const read = readMeasure(text, unit, quantity);
  return read.ok ? `read as ${read.value}` : read.message;
}

// Source: 1 in = 25.4 mm exactly (international inch, 1959); rows are arithmetic on it.
describe('length units', () => {
  test.each(readReference('05b_length_units'))('$value $unit is exactly $expected_mm mm (by definition)', (row) => {
    const { text, unit } = referenceMeasure(row);
    for (const to of ['in', 'mm', 'thou'] as const) {
      expect(readMeasure(text, unit)).toMatchObject({ ok: true });
      const read = readMeasure(text, unit);
      const exact = read.ok && (unit === 'in' || unit === 'thou') ? inUnit(read.exact, unit, to) : null;
      expect(exact && exact.numerator / exact.denominator).toBe(Number(row[`expected_${to}`]));
    }
  });

  test('a length comes back exactly from any round of units', () => {
    const unit = fc.constantFrom(...lengthUnits);
    const sixDecimals = fc.integer({ min: 1, max: 2_000_000_000 }).map((millionths) => (millionths / 1e6).toFixed(6));
    fc.assert(
      fc.property(sixDecimals, unit, unit, unit, (text, a, b, c) => {
        const read = readMeasure(`${text} in`, 'in');
        if (!read.ok) return;
        const round = inUnit(inUnit(inUnit(inUnit(read.exact, 'in', a), a, b), b, c), c, 'in');
        expect(round).toEqual(read.exact);
      }),
    );
  });
});

describe('what a person types', () => {
  test.each([
    ['1/64', 'in', 1, 64],
    ['3 1/2', 'in', 7, 2],
    ['3-1/2', 'in', 7, 2],
    ['3½', 'in', 7, 2],
    ['½"', 'in', 1, 2],
    ['0.010', 'in', 1, 100],
    ['.010', 'in', 1, 100],
    ['1,5', 'mm', 3, 2],
    ['25.', 'in', 25, 1],
    ['25.5 in', 'in', 51, 2],
    ['25.5"', 'in', 51, 2],
    ['25.5 in', 'mm', 6477, 10],
    ['647.7 mm', 'in', 51, 2],
    ['10 thou', 'in', 1, 100],
    ['6 64ths', 'in', 3, 32],
    ['4/64', '64ths', 4, 1],
    ['3/32', '64ths', 6, 1],
    ['4 1/2', '64ths', 9, 2],
    ['10 mm', '', 10, 1],
    ['2.0', 'dE', 2, 1],
    ['-3', 'cents', -3, 1],
    ['−3 cents', 'cents', -3, 1],
  ] as const)('"%s" in a field of "%s" is %d/%d, kept exactly', (text, unit, numerator, denominator) => {
    expect(readMeasure(text, unit)).toMatchObject({ ok: true, exact: { numerator, denominator } });
  });

  test('a back-bow and a straight neck are legal as relief', () => {
    expect(readMeasure('-0.004', 'in', 'relief')).toMatchObject({ ok: true, value: -0.004 });
    expect(readMeasure('0', 'in', 'relief')).toMatchObject({ ok: true, value: 0 });
  });

  test.each([
    ['', 'in', /Write a number/],
    ['   ', 'in', /Write a number/],
    ['NaN', 'in', /not a number/],
    ['Infinity', 'in', /not a number/],
    ['1e3', 'in', /not a number/],
    ['0x1A', 'mm', /not a/],
    ['1.5.2', 'in', /not a number/],
    ['.', 'in', /not a number/],
    ['-', 'in', /not a number/],
    ['1/2/3', 'in', /not a number/],
    ['9'.repeat(60), 'in', /not a number/],
    ['1/0', 'in', /0 below its line/],
    ['1/5000', 'in', /decimal/],
    ['1,700', 'mm', /Write 1\.700 or 1700/],
    ['0', 'in', /above 0/],
    ['-1', 'mm', /above 0/],
    ['5000', 'mm', /Look at the number and its unit/],
    ['10', '', /Say the unit/],
    ['5 kg', 'in', /"kg" is not a unit/],
    ['10 mm', 'kohm', /in kΩ/],
    ['101', 'percent', /between 0 and 100 %/],
    ['2.5', 'count', /whole number/],
  ] as const)('"%s" in a field of "%s" is refused with what to do', (text, unit, sentence) => {
    expect(message(text, unit)).toMatch(sentence);
  });

  test.each([
    ['25.5', 'mm', 'scale length', 'A scale length of 25.5 mm cannot be meant. If 25.5 in was meant, change the unit.'],
    [
      '647.7',
      'in',
      'scale length',
      'A scale length of 647.7 in cannot be meant. If 647.7 mm was meant, change the unit.',
    ],
    ['10', 'in', 'string gauge', 'A string gauge of 10 in cannot be meant. If 10 thou was meant, change the unit.'],
    ['4', 'in', 'action', 'An action of 4 in cannot be meant. If 4 mm was meant, change the unit.'],
    ['0', 'in', 'scale length', 'A scale length of 0 in cannot be meant. Look at the number and its unit.'],
    ['3', 'kohm', 'action', 'An action is a length: write in, mm, thou or 64ths behind it.'],
  ] as const)('%s %s cannot be meant as a %s', (text, unit, quantity, sentence) => {
    expect(message(text, unit, quantity)).toBe(sentence);
  });

  test('any text at all is read or refused with a sentence, never thrown at', () => {
    fc.assert(
      fc.property(fc.string(), fc.constantFrom<Unit | ''>('', 'in', 'mm', '64ths', 'cents', 'count'), (text, unit) => {
        const read = readMeasure(text, unit);
        expect(read.ok ? Number.isSafeInteger(read.exact.numerator) : read.message.length > 10).toBe(true);
      }),
    );
  });
});

describe('how a length is shown', () => {
  test.each([
    ['25.5', 'in', 'in', '25.5 in'],
    ['25.5', 'in', 'fraction', '25 1/2 in'],
    ['25.5', 'in', 'mm', '647.7 mm'],
    ['1.700', 'in', 'in', '1.700 in'],
    ['25 1/2', 'in', 'fraction', '25 1/2 in'],
    ['25 1/2', 'in', 'in', '25.5 in'],
    ['25.5 in', 'mm', 'in', '25.5 in'],
    ['648', 'mm', 'fraction', 'about 25 33/64 in'],
    ['648.0', 'mm', 'mm', '648.0 mm'],
    ['0.008', 'in', 'fraction', '0.008 in'],
    ['10', 'thou', 'in', '0.010 in'],
    ['6', '64ths', 'fraction', '6/64 in'],
    ['6/64', 'in', 'fraction', '6/64 in'],
    ['4.5', '64ths', 'fraction', '9/128 in'],
    ['4 1/2', '64ths', 'fraction', '9/128 in'],
    ['4.3', '64ths', 'fraction', '0.0672 in'],
    ['4.5', '64ths', 'mm', '1.786 mm'],
    ['4', '64ths', 'mm', '1.588 mm'],
    ['-1/16', 'in', 'mm', '-1.588 mm'],
    ['-1/64', 'in', 'in', '-0.0156 in'],
    ['12', 'deg', 'mm', '12°'],
    ['ebony', 'in', 'mm', 'ebony'],
  ] as const)('%s (%s) as %s reads "%s"', (text, unit, show, words) => {
    expect(lengthWords({ text, unit }, show)).toBe(words);
  });

  test('what was typed is shown with its own digits in its own unit', () => {
    const digits = fc.integer({ min: 1000, max: 99_999 }).map((thousandths) => (thousandths / 1000).toFixed(3));
    fc.assert(
      fc.property(digits, fc.constantFrom<ShownUnit & LengthUnit>('in', 'mm'), (text, unit) => {
        expect(lengthWords({ text, unit }, unit)).toBe(`${text} ${unit}`);
      }),
    );
  });
});

describe('a measured value beside its tolerance', () => {
  const aim: Measure = { text: '27', unit: 'in' };

  test.each([
    ['27.002', 'in', 'within', 0.002],
    ['27.005', 'in', 'within', 0.005],
    ['26.995', 'in', 'within', -0.005],
    ['27.005001', 'in', 'outside', 0.005001],
    ['685.927', 'mm', 'within', 0.005],
    ['685.9271', 'mm', 'outside', 0.127_1 / 25.4],
  ] as const)('%s %s against 27 ± 0.005 in is %s', (text, unit, standing, distance) => {
    const found = verdict({ text, unit }, aim, '0.005');
    expect(found).toMatchObject({ ok: true, standing });
    expect(found.ok && found.distanceValue).toBeCloseTo(distance, 12);
  });

  test('the edge of a tolerance is within, however the numbers are typed', () => {
    const thousandths = fc.integer({ min: 1, max: 900 });
    fc.assert(
      fc.property(thousandths, (tolerance) => {
        const text = (tolerance / 1000).toFixed(3);
        const edge = verdict({ text: (27 + tolerance / 1000).toFixed(3), unit: 'in' }, aim, text);
        const over = verdict({ text: (27 + (tolerance + 0.001) / 1000).toFixed(6), unit: 'in' }, aim, text);
        expect([edge.ok && edge.standing, over.ok && over.standing]).toEqual(['within', 'outside']);
      }),
    );
  });

  test('a tolerance may differ above and below', () => {
    const relief: Measure = { text: '0.008', unit: 'in' };
    const standing = (text: string) => verdict({ text, unit: 'in' }, relief, '+0.002 -0.001');
    expect(standing('0.010')).toMatchObject({ standing: 'within' });
    expect(standing('0.0069')).toMatchObject({ standing: 'outside' });
  });

  test('says how far outside a value lies', () => {
    expect(verdict({ text: '27.006', unit: 'in' }, aim, '0.005')).toMatchObject({
      words: '0.006 in over the aim, outside ± 0.005 in',
    });
  });

  test('a tolerance wider than its value is refused', () => {
    expect(readTolerance('30', aim)).toEqual({
      ok: false,
      message: 'A tolerance of 30 is wider than the value itself, 27. Give a smaller one.',
    });
    expect(verdict(aim, aim, '30').ok).toBe(false);
    expect(readTolerance('3', { text: '0', unit: 'cents' }).ok).toBe(true);
  });

  test.each(['', 'abc', '-0.005', '± ', '+ - '])('the tolerance "%s" is refused', (text) => {
    expect(readTolerance(text, aim).ok).toBe(false);
  });

  test('values of different kinds are not compared', () => {
    expect(verdict({ text: '3', unit: 'g' }, aim, '0.005')).toMatchObject({ ok: false });
  });
});
