import { describe, expect, test } from 'vitest';
import {
  adjustmentFor,
  calibrationWords,
  crpsOfCurve,
  firstOfEachStage,
  isClearlyOff,
  judge,
  measureAdjustments,
  type JudgedWindow,
} from '@/lib/schedule/calibration';
import { addDays } from '@/lib/schedule/days';
import { pmfFromWeights } from '@/lib/schedule/pmf';
import { coverageOf, crpsOfPmf } from '@/lib/schedule/scores';

const TODAY = '2026-12-01';
const GIVEN = '2025-01-06';

/** A window from 150 to 250 days after it was given, of a build that was ready `readyAfter` days after. */
const judged = (readyAfter: number, i = 0, over: Partial<JudgedWindow> = {}): JudgedWindow => ({
  buildId: `build ${i}`,
  stageKey: 'frets',
  givenOn: GIVEN,
  earliestOn: addDays(GIVEN, 150),
  likelyOn: addDays(GIVEN, 200),
  latestOn: addDays(GIVEN, 250),
  rawEarliestOn: addDays(GIVEN, 150),
  rawLatestOn: addDays(GIVEN, 250),
  yardstickDays: 50,
  curve: null,
  readyOn: addDays(GIVEN, readyAfter),
  waitedDays: 0,
  ...over,
});

/** So many builds, ready evenly between two days. */
const spread = (count: number, from: number, to: number, over: Partial<JudgedWindow> = {}) =>
  Array.from({ length: count }, (_, i) => judged(Math.round(from + ((to - from) * (i + 0.5)) / count), i, over));

describe('how windows held', () => {
  test('counts those with the day inside, both ends included', () => {
    const { all, byStage } = judge([149, 150, 200, 250, 251].map((days, i) => judged(days, i)));
    expect([all?.held, all?.of]).toEqual([3, 5]);
    expect(byStage).toEqual([{ stageKey: 'frets', coverage: all }]);
  });

  test('does not hold the owner’s own wait against a window', () => {
    expect(judge([judged(260, 0, { waitedDays: 14 })]).all?.held).toBe(1);
  });

  test('takes the first window of each build and stage', () => {
    const later = judged(100, 1, { givenOn: addDays(GIVEN, 4) });
    expect(firstOfEachStage([later, judged(100, 1), judged(100, 2)])).toHaveLength(2);
    expect(firstOfEachStage([later, judged(100, 1)])[0]?.givenOn).toBe(GIVEN);
  });

  test('pinball loss of the three dates', () => {
    // 204 days: 0.1 * 54, 0.5 * 4, 0.1 * 46
    expect(judge([judged(204)]).pinballDays).toBeCloseTo((5.4 + 2 + 4.6) / 3, 12);
  });

  test('CRPS of a kept curve is that of its distribution', () => {
    const die = pmfFromWeights([1, 2, 3, 4, 5, 6], [1, 1, 1, 1, 1, 1]);
    const curve = [1, 2, 3, 4, 5, 6].map((days) => ({ on: addDays(GIVEN, days), probability: days / 6 }));
    for (const days of [0, 1, 3, 6, 8]) {
      expect(crpsOfCurve(curve, addDays(GIVEN, days))).toBeCloseTo(crpsOfPmf(die, days), 9);
    }
    expect(judge([judged(3, 0, { curve })]).crpsDays).toBeCloseTo(crpsOfPmf(die, 3), 9);
  });

  test('says nothing of no windows', () => {
    expect(judge([])).toEqual({ all: null, byStage: [], pinballDays: null, crpsDays: null });
    expect(calibrationWords(null, null)).toBe('No window has been judged yet.');
  });
});

describe('the adjustment', () => {
  const held = (windows: JudgedWindow[], early: number, late: number) =>
    windows.filter(({ readyOn, rawEarliestOn, rawLatestOn, yardstickDays }) => {
      const from = addDays(rawEarliestOn, Math.round((1 - early) * yardstickDays));
      return from <= readyOn && readyOn <= addDays(rawLatestOn, Math.round((late - 1) * yardstickDays));
    }).length / windows.length;

  test.each([
    ['too narrow', spread(100, 50, 350)],
    ['too wide', spread(100, 170, 230)],
    ['too early', spread(100, 160, 310)],
  ])('makes windows that were %s hold 8 in 10', (_, windows) => {
    const adjustment = adjustmentFor(measureAdjustments(windows, TODAY), 'frets');
    expect(adjustment).not.toBeNull();
    const share = held(windows, adjustment?.early ?? 1, adjustment?.late ?? 1);
    expect(share).toBeGreaterThanOrEqual(0.77);
    expect(share).toBeLessThanOrEqual(0.86);
  });

  test('leaves windows that hold 8 in 10 as they are', () => {
    expect(adjustmentFor(measureAdjustments(spread(100, 137.5, 262.5), TODAY), 'frets')).toBeNull();
  });

  test('does not undo itself: windows that hold because they were widened stay wide', () => {
    const widened = { earliestOn: addDays(GIVEN, 80), latestOn: addDays(GIVEN, 320) };
    const windows = spread(100, 50, 350, widened);
    expect(judge(windows).all?.share).toBeCloseTo(0.8, 1);
    expect(adjustmentFor(measureAdjustments(windows, TODAY), 'frets')?.late).toBeGreaterThan(1.2);
  });

  test('measures nothing with fewer than 60 windows', () => {
    expect(measureAdjustments(spread(59, 50, 350), TODAY).ofRoute).toBeNull();
  });

  test('a stage without one of its own takes the route’s', () => {
    const windows = [...spread(100, 50, 350), ...spread(20, 50, 350, { stageKey: 'lumber' })];
    const measured = measureAdjustments(windows, TODAY);
    expect(measured.byStage.has('lumber')).toBe(false);
    expect(adjustmentFor(measured, 'lumber')).toEqual(measured.ofRoute);
  });

  test('windows whose slow builds may still be on the floor are left out', () => {
    const today = addDays(GIVEN, 300);
    const old = spread(70, 50, 350, { givenOn: addDays(GIVEN, -60) });
    const fastOnes = Array.from({ length: 100 }, (_, i) => judged(200, 100 + i));
    expect(measureAdjustments([...old, ...fastOnes], today)).toEqual(measureAdjustments(old, today));
  });

  test('stays within bounds, whatever came', () => {
    const adjustment = measureAdjustments(spread(80, 600, 650), TODAY).ofRoute;
    expect(adjustment).toEqual({ early: 0.5, late: 3 });
  });
});

describe('said to the shop', () => {
  test('clearly off means that 8 in 10 lies outside the 95 % bounds', () => {
    expect(isClearlyOff(coverageOf(40, 50))).toBe(false);
    expect(isClearlyOff(coverageOf(36, 50))).toBe(false);
    expect(isClearlyOff(coverageOf(65, 100))).toBe(true);
    expect(isClearlyOff(coverageOf(95, 100))).toBe(true);
  });

  test('as a sentence', () => {
    const all = coverageOf(120, 180);
    expect(calibrationWords(all, null)).toBe('120 of 180 windows held, 7 in 10. Windows are given as they come.');
    expect(calibrationWords(all, { early: 1.1, late: 1.5 })).toBe(
      '120 of 180 windows held, 7 in 10. Windows are given 30 % wider, by how past ones held.',
    );
    expect(calibrationWords(all, { early: 0.8, late: 0.9 })).toMatch(/15 % narrower/);
    expect(calibrationWords(all, { early: 0.7, late: 1.3 })).toMatch(/moved to where past builds were ready/);
  });
});
