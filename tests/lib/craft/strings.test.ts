import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { centsBetween } from '@/lib/craft/cents';
import { gaugeWords, readGauge, readGauges } from '@/lib/craft/gauges';
import { noteFrequencyHz, noteWords, readNote, readNotes } from '@/lib/craft/notes';
import { balanceWords, changeString, changeWords, stringBalance } from '@/lib/craft/string-balance';
import { unitWeight } from '@/lib/craft/string-weights';
import { newtons, readStringSet, setTension, stringTensionLb, type StringPlan } from '@/lib/craft/strings';
import { readReference } from '../../support/reference';

function planOf(tuning: string, gauges: string, bassIn: number, trebleIn = bassIn): StringPlan {
  const read = readStringSet(tuning, gauges);
  if (!read.ok) throw new Error(read.message);
  return { strings: read.strings, bassScaleMm: bassIn * 25.4, trebleScaleMm: trebleIn * 25.4 };
}

function gaugeOf(text: string) {
  const read = readGauge(text);
  if (!read.ok) throw new Error(read.message);
  return read.gauge;
}

function tensionOf(plan: StringPlan) {
  const set = setTension(plan);
  if (!set.ok) throw new Error(set.message);
  return set;
}

describe('notes', () => {
  // Source: ISO 16:1975 for A4; the other rows are commonly tabulated values from memory.
  test.each(readReference('04c_pitch_frequency'))('$note is $expected_frequency_Hz Hz (from memory)', (row) => {
    for (const name of (row.note ?? '').replace(')', '').split(' (')) {
      const read = readNote(name);
      expect(read).toMatchObject({ ok: true, note: { midi: Number(row.midi_number) } });
      const hz = read.ok ? noteFrequencyHz(read.note.midi) : Number.NaN;
      expect(Math.abs(hz - Number(row.expected_frequency_Hz))).toBeLessThanOrEqual(Number(row.tolerance_Hz));
    }
  });

  test.each([
    ['f#1', 30],
    ['F♯1', 30],
    ['Gb1', 30],
    ['G♭1', 30],
    ['Cb4', 59],
    ['B#3', 60],
    ['c4', 60],
  ])('%s is MIDI %d', (text, midi) => {
    expect(readNote(text)).toMatchObject({ ok: true, note: { midi } });
  });

  test.each([
    ['H2', /not a note/],
    ['', /not a note/],
    ['E##2', /not a note/],
    ['E22', /not a note/],
    ['E', /needs its octave/],
    ['F#', /needs its octave/],
    ['E-1', /No string sounds/],
  ])('"%s" is refused with what to do', (text, sentence) => {
    const read = readNote(text);
    expect(read.ok ? 'read' : read.message).toMatch(sentence);
  });

  test('a whole tuning is read, and one bad note refuses it', () => {
    const read = readNotes('B1 E2, A2-D3 F#3 B3');
    expect(read.ok && read.notes.map((note) => noteWords(note))).toEqual(['B1', 'E2', 'A2', 'D3', 'F♯3', 'B3']);
    expect(readNotes('E2 A2 X3')).toMatchObject({ ok: false });
    expect(readNotes(' ')).toMatchObject({ ok: false });
  });

  test('another concert pitch moves every note by the same interval', () => {
    fc.assert(
      fc.property(fc.integer({ min: 20, max: 100 }), fc.double({ min: 400, max: 480, noNaN: true }), (midi, a4Hz) => {
        const moved = centsBetween(noteFrequencyHz(midi, a4Hz), noteFrequencyHz(midi));
        expect(moved).toBeCloseTo(centsBetween(a4Hz, 440), 6);
      }),
    );
    expect(() => noteFrequencyHz(69, 0)).toThrow(RangeError);
  });
});

describe('gauges', () => {
  test.each([
    ['.010', 10, 'plain'],
    ['0.010', 10, 'plain'],
    ['10', 10, 'plain'],
    ['10p', 10, 'plain'],
    ['9.5', 9.5, 'plain'],
    ['.0095', 9.5, 'plain'],
    ['46w', 46, 'wound'],
    ['.046', 46, 'wound'],
    ['20w', 20, 'wound'],
    ['22 P', 22, 'plain'],
    ['0,010', 10, 'plain'],
  ])('"%s" is %d thou, %s', (text, gaugeThou, construction) => {
    expect(readGauge(text)).toMatchObject({ ok: true, gauge: { gaugeThou, construction } });
  });

  test.each([
    ['', /not a string gauge/],
    ['light', /not a string gauge/],
    ['-10', /not a string gauge/],
    ['0', /cannot be meant/],
    ['1', /cannot be meant/],
    ['300', /cannot be meant/],
    ['22', /\.022 comes plain and wound\. Write 22p or 22w/],
  ])('"%s" is refused with what to do', (text, sentence) => {
    const read = readGauge(text);
    expect(read.ok ? 'read' : read.message).toMatch(sentence);
  });

  test('a set is read however it is parted', () => {
    for (const text of [
      '10 13 17 26 36 46',
      '10-13-17-26-36-46',
      '.010, .013, .017, .026, .036, .046',
      '10,13,17,26,36,46',
    ]) {
      const read = readGauges(text);
      expect(read.ok && read.gauges.map(({ gaugeThou }) => gaugeThou)).toEqual([10, 13, 17, 26, 36, 46]);
    }
    expect(gaugeWords(9.5)).toBe('.0095');
  });
});

describe('string tension', () => {
  // Source: D'Addario, A Complete Technical Reference for Fretted Instrument String Tensions (seen, all rows).
  test.each(readReference('04_string_tension'))(
    '$string_item at $note over $scale_length_in in pulls $expected_tension_lb lb',
    (row) => {
      const read = readNote(row.note ?? '');
      const hz = read.ok ? noteFrequencyHz(read.note.midi) : Number.NaN;
      expect(Math.abs(hz - Number(row.frequency_Hz))).toBeLessThanOrEqual(0.00006);
      const tension = stringTensionLb(Number(row.unit_weight_lb_per_in), Number(row.scale_length_in), hz);
      expect(Math.abs(tension - Number(row.expected_tension_lb))).toBeLessThanOrEqual(Number(row.tolerance_lb));
    },
  );

  // Source: the same chart (seen).
  test.each(readReference('04b_string_unit_weights'))(
    '$string_item weighs $unit_weight_lb_per_in lb per inch',
    (row) => {
      const construction = row.construction?.startsWith('Plain') ? 'plain' : 'wound';
      const gaugeThou = Math.round(Number(row.gauge_in) * 10_000) / 10;
      expect(unitWeight(gaugeThou, construction)).toEqual({
        lbPerIn: Number(row.unit_weight_lb_per_in),
        isListed: true,
      });
    },
  );

  // Source: cells of the same chart (seen); the composition of the set is from memory, its sum computed.
  test('a light set at 25.5 in pulls what the chart says, string by string and in total', () => {
    const rows = readReference('04d_set_total');
    const { strings, totalLb } = tensionOf(planOf('E2 A2 D3 G3 B3 E4', '10 13 17 26 36 46', 25.5));
    for (const [i, string] of strings.entries()) {
      expect(Math.abs(string.tensionLb - Number(rows[i]?.expected_tension_lb))).toBeLessThanOrEqual(0.055);
    }
    const rounded = strings.reduce((sum, { tensionLb }) => sum + Number(tensionLb.toFixed(1)), 0);
    expect(rounded).toBeCloseTo(Number(rows.at(-1)?.expected_tension_lb), 6);
    expect(Math.abs(totalLb - rounded)).toBeLessThan(0.3);
  });

  test('a pound is 4.448 newtons, and shares make a whole', () => {
    const { strings, totalLb, totalN } = tensionOf(planOf('E2 A2 D3 G3 B3 E4', '10 13 17 26 36 46', 25.5));
    expect(totalN).toBeCloseTo(totalLb * 4.4482216, 4);
    expect(newtons(1)).toBeCloseTo(4.4482216, 7);
    expect(strings.reduce((sum, { share }) => sum + share, 0)).toBeCloseTo(1, 12);
  });

  test('two scales give each string its own length, the outer ones theirs', () => {
    const { strings } = tensionOf(planOf('B1 E2 A2 D3 G3 B3 E4', '10 13 17 26 36 46 62', 27, 25.5));
    expect(strings.map(({ scaleLengthIn }) => Number(scaleLengthIn.toFixed(6)))).toEqual([
      25.5, 25.75, 26, 26.25, 26.5, 26.75, 27,
    ]);
  });

  test('a gauge between two published ones weighs between them, and says so', () => {
    const [below, between, above] = [40, 42, 44].map((gauge) => unitWeight(gauge, 'wound'));
    expect(between?.isListed).toBe(true);
    expect(below?.isListed).toBe(false);
    expect(below?.lbPerIn).toBeGreaterThan(unitWeight(39, 'wound')?.lbPerIn ?? 1);
    expect(below?.lbPerIn).toBeLessThan(above?.lbPerIn ?? 0);
    expect(unitWeight(90, 'wound')).toBeNull();
  });

  test('either side may come first', () => {
    const a = planOf('E2 A2 D3 G3 B3 E4', '46 36 26 17 13 10', 25.5);
    expect(planOf('E4 B3 G3 D3 A2 E2', '10 13 17 26 36 46', 25.5)).toEqual(a);
  });

  test.each([
    ['E2 A2 D3 G3 B3 E4', '10 13 17 26 36 46 59', /7 strings and only 6 notes/],
    ['B1 E2 A2 D3 G3 B3 E4', '10 13 17 26 36 46', /7 notes and only 6 gauges/],
    ['E2 A2 D3 G3 B3 J4', '10 13 17 26 36 46', /not a note/],
    ['E2 A2 D3 G3 B3 E4', '10 13 x 26 36 46', /not a string gauge/],
  ])('%s with %s is refused with what to do', (tuning, gauges, sentence) => {
    const read = readStringSet(tuning, gauges);
    expect(read.ok ? 'read' : read.message).toMatch(sentence);
  });

  test('a gauge without a known weight is refused with the ones that have it', () => {
    expect(setTension(planOf('E2 E4', '10 120', 25.5))).toMatchObject({
      message:
        'The tension of this set cannot be told: no weight is known for a wound .120. Those that were published run from .017 to .080; for others ask the strings’ maker.',
    });
  });
});

describe('balance across the strings', () => {
  const plan = planOf('E2 A2 D3 G3 B3 E4', '10 13 17 26 36 46', 25.5);

  test('names the strings below and above the band, and the nearest gauge that would lie in it', () => {
    const read = stringBalance(plan, { lowLb: 16, highLb: 19 });
    if (!read.ok) throw new Error(read.message);
    const standings = read.balance.strings.map(({ standing }) => standing);
    expect(standings).toEqual(['within', 'below', 'within', 'within', 'above', 'within']);
    const [, second] = read.balance.strings;
    const changed = changeString(plan, 2, {
      gaugeThou: second?.advice?.gaugeThou ?? 0,
      construction: 'plain',
      isAssumed: false,
    });
    expect(second?.advice?.gaugeThou).toBe(13.5);
    expect(changed.ok && changed.after.tensionLb).toBe(second?.advice?.tensionLb);
    expect(balanceWords(read.balance)).toContain('String 2, B3, lies below it; a .0135 would bring it to 16.6 lb.');
  });

  test('without a band no string stands anywhere', () => {
    const read = stringBalance(plan, null);
    expect(read.ok && read.balance.strings.every(({ standing }) => standing === 'no band')).toBe(true);
  });

  test('changing one string changes it and the total by the same amount', () => {
    const changed = changeString(plan, 6, gaugeOf('49'));
    if (!changed.ok) throw new Error(changed.message);
    expect(changed.totalLb - tensionOf(plan).totalLb).toBeCloseTo(changed.differenceLb, 9);
    expect(changed.differenceLb).toBeGreaterThan(0);
    expect(changeWords(changed)).toBe(
      'A .049 takes E2 from 17.5 to 19.7 lb (87 N), 2.2 lb more, and the set to 105.7 lb (470 N).',
    );
    const back = changeString(plan, 6, gaugeOf('46'));
    expect(back.ok && changeWords(back)).toContain('from 17.5 to 17.5 lb (78 N), no more and no less, and the set to');
    expect(changeString(plan, 7, gaugeOf('49'))).toMatchObject({ ok: false });
  });

  test.each([
    { lowLb: 20, highLb: 16 },
    { lowLb: 0, highLb: 16 },
    { lowLb: Number.NaN, highLb: 16 },
    { lowLb: 16, highLb: 1000 },
  ])('the band %o is refused', (band) => {
    expect(stringBalance(plan, band)).toMatchObject({ ok: false });
  });
});
