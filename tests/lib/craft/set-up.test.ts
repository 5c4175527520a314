import { describe, expect, test } from 'vitest';
import { centsBetween, intonationVerdict } from '@/lib/craft/cents';
import { setupLines, setupVerdict, trussRodTrouble, type SetupLine, type SetupSheet } from '@/lib/craft/set-up';
import { setupRanges } from '@/lib/craft/set-up-ranges';
import { byProvenance, cell } from '../../support/provenance';
import { readReference } from '../../support/reference';

const six: SetupSheet = { instrument: 'guitar', stringCount: 6, plainCount: 3, pickups: ['neck', 'bridge'] };
const published = readReference('05_setup_ranges');

function line(key: string, sheet = six): SetupLine {
  const found = setupLines(sheet).find((one) => one.key === key);
  if (!found) throw new Error(`no line ${key}`);
  return found;
}

/** Low and high that a row of the shop's starting list allows, in its own unit. */
function ends(key: string, instrument = 'guitar') {
  const range = setupRanges.find((row) => row.key === key && row.instrument === instrument);
  const [aim, tolerance] = [Number(range?.aim.text), Number(range?.tolerance)];
  return { low: aim - tolerance, high: aim + tolerance, aim, provenance: range?.provenance };
}

const row = (quantity: string) => {
  const found = published.find((one) => one.quantity === quantity);
  if (!found) throw new Error(`no row ${quantity}`);
  return found;
};

// Sources: kit manuals and a maker's owner manual as named in each row; practice rows have none.
describe('the starting set-up figures', () => {
  test('of relief run over the published range', () => {
    const found = row('neck relief, straight to a little forward bow');
    const { low, high, provenance } = ends('relief');
    expect([low, high, provenance]).toEqual([cell(found, 'low'), cell(found, 'high'), found.provenance]);
  });

  test.each([
    ['string height over 1st fret, plain strings', 'nut_slot_plain'],
    ['string height over 1st fret, wound strings', 'nut_slot_wound'],
  ])('of %s aim at the published one', (quantity, key) => {
    expect(ends(key).aim).toBe(cell(row(quantity), 'low'));
    expect(ends(key).provenance).toBe(row(quantity).provenance);
  });

  test.each([
    ['pickup height, humbucker neck position', 'pickup_neck'],
    ['pickup height, humbucker bridge position', 'pickup_bridge'],
  ])('of %s are the published 32nds, written in 64ths', (quantity, key) => {
    const { low, high, provenance } = ends(key);
    expect([low / 2, high / 2]).toEqual([cell(row(quantity), 'low'), cell(row(quantity), 'high')]);
    expect(provenance).toBe(row(quantity).provenance);
  });

  test.each([
    ['string height at 12th fret, common range bass side', 'action_bass'],
    ['string height at 12th fret, common range treble side', 'action_treble'],
    ['intonation, 12th-fret note against 12th-fret harmonic', 'intonation'],
  ])('of %s are marked as practice', (quantity, key) => {
    const { low, high, provenance } = ends(key);
    expect([low, high]).toEqual([cell(row(quantity), 'low'), cell(row(quantity), 'high')]);
    expect(provenance).toBe('practice');
  });

  test('of action let the one published maker pass', () => {
    const bass = setupVerdict(line('action_bass'), row('string height at 12th fret, low E').low ?? '');
    const treble = setupVerdict(line('action_treble'), row('string height at 12th fret, high E').low ?? '');
    expect([bass.standing, treble.standing]).toEqual(['within', 'within']);
  });

  test('call a relief out of tolerance that its article calls more than necessary', () => {
    const [high] = published.filter(({ quantity }) => quantity?.startsWith('relief measured on one guitar'));
    expect(setupVerdict(line('relief'), high?.low ?? '').standing).toBe('outside');
  });
});

describe('a set-up sheet', () => {
  test('has a line for every string, side and pickup', () => {
    const keys = setupLines(six).map(({ key }) => key);
    expect(keys).toHaveLength(1 + 6 + 2 + 4 + 6);
    expect(new Set(keys).size).toBe(keys.length);
  });

  test('aims higher over the first fret where strings are wound', () => {
    expect(line('nut_slot_3').aim.text).toBe('0.012');
    expect(line('nut_slot_4').aim.text).toBe('0.020');
  });

  test('of a bass has its own relief', () => {
    const bass: SetupSheet = { instrument: 'bass', stringCount: 5, plainCount: 0, pickups: ['bridge'] };
    expect(line('relief', bass).aim.text).toBe('0.018');
  });

  test('leaves out what the shop has taken off its list', () => {
    const own = setupRanges.filter(({ kind }) => kind !== 'nut_slot');
    expect(setupLines(six, own).some(({ key }) => key.startsWith('nut_slot'))).toBe(false);
  });

  test('every aim meets its own tolerance', () => {
    for (const instrument of ['guitar', 'bass'] as const) {
      const pickups = ['neck', 'middle', 'bridge'] as const;
      for (const one of setupLines({ instrument, stringCount: 6, plainCount: 3, pickups: [...pickups] })) {
        expect(setupVerdict(one, one.aim.text).standing).toBe('within');
      }
    }
  });

  test.each([0, 2.5, 19, Number.NaN])('of %d strings is refused', (stringCount) => {
    expect(() => setupLines({ ...six, stringCount, plainCount: 0 })).toThrow(RangeError);
  });

  test('with more plain strings than strings is refused', () => {
    expect(() => setupLines({ ...six, plainCount: 7 })).toThrow(RangeError);
  });
});

describe('a value typed on the sheet', () => {
  test.each([
    ['relief', '0.010', 'within'],
    ['relief', '0.25 mm', 'within'],
    ['relief', '0', 'within'],
    ['relief', '-0.004', 'outside'],
    ['action_bass', '4.5', 'within'],
    ['action_bass', '6/64', 'within'],
    ['action_bass', '2 mm', 'within'],
    ['action_bass', '7', 'outside'],
    ['intonation_1', '-3', 'within'],
    ['intonation_1', '3.5', 'outside'],
  ])('on %s, %s is %s', (key, text, standing) => {
    expect(setupVerdict(line(key), text).standing).toBe(standing);
  });

  test.each([
    ['relief', '10'],
    ['action_bass', '4 in'],
    ['relief', 'flat'],
    ['relief', ''],
    ['intonation_1', '150'],
    ['intonation_1', '0.01 in'],
  ])('on %s, %j cannot be meant and gets a sentence', (key, text) => {
    const found = setupVerdict(line(key), text);
    expect(found.standing).toBe('refused');
    expect(found.words).toMatch(/\.$/);
  });
});

describe('cents', () => {
  const cents = readReference('05c_cents');

  test('have no row with outside proof', () => expect(byProvenance(cents).outside).toEqual([]));

  // Standard interval sizes, recalled and reproduced by the definition; the others are computed.
  test.each(cents)('$provenance: $frequency_or_numerator to $reference_or_denominator is $expected_cents', (one) => {
    const found = centsBetween(cell(one, 'frequency_or_numerator'), cell(one, 'reference_or_denominator'));
    expect(Math.abs(found - cell(one, 'expected_cents'))).toBeLessThanOrEqual(cell(one, 'tolerance_cents'));
  });

  test.each([0, -440, Number.NaN])('of %d Hz are not computed', (hz) => {
    expect(() => centsBetween(hz, 440)).toThrow(RangeError);
    expect(() => centsBetween(440, hz)).toThrow(RangeError);
  });

  test('a sharp note sends the saddle away from the neck, a flat one towards it', () => {
    expect(intonationVerdict(442, 440).words).toBe('7.9 cents sharp: move the saddle away from the neck');
    expect(intonationVerdict(438, 440).words).toContain('flat: move the saddle towards the neck');
    expect(intonationVerdict(440.1, 440)).toMatchObject({ isWithin: true });
  });
});

test('a turn of the truss rod beyond a quarter is warned of, either way', () => {
  expect(trussRodTrouble(0.25)).toBeNull();
  expect(trussRodTrouble(-0.5)).toContain('quarter turn');
  expect(trussRodTrouble(Number.NaN)).toContain('Write the turn');
});
