import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { fingerboard, type FingerboardPlan } from '@/lib/craft/fingerboard';
import { slotLabels } from '@/lib/craft/slot-labels';

const plan: FingerboardPlan = {
  bassScaleMm: 685.8,
  trebleScaleMm: 647.7,
  perpendicularFret: 7,
  fretCount: 24,
  stringCount: 7,
  nutWidthMm: 48,
  lastFretWidthMm: 64,
  inlay: 'dots',
};

function labelsOf(fretCount: number, side: 'bass' | 'treble', unit: 'in' | 'mm', widthPx: number) {
  const read = fingerboard({ ...plan, fretCount });
  if (!read.ok) throw new Error(read.message);
  return slotLabels(read.board, side, unit, widthPx);
}

describe('the positions under a drawing', () => {
  test('never touch each other or leave the drawing, on any screen', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 12, max: 36 }),
        fc.constantFrom('bass', 'treble'),
        fc.constantFrom('in', 'mm'),
        fc.integer({ min: 260, max: 1600 }),
        (fretCount, side, unit, widthPx) => {
          const spans = labelsOf(fretCount, side, unit, widthPx).map(({ across, words }) => {
            const half = words.length * 3.4;
            return { from: across * widthPx - half, to: across * widthPx + half };
          });
          expect(spans[0]?.from).toBeGreaterThanOrEqual(0);
          expect(spans.at(-1)?.to).toBeLessThanOrEqual(widthPx);
          spans.slice(1).forEach(({ from }, i) => expect(from).toBeGreaterThan((spans[i]?.to ?? 0) + 8));
        },
      ),
    );
  });

  test('always name the 12th and the last fret, and more where there is room', () => {
    const narrow = labelsOf(24, 'bass', 'in', 300).map(({ fret }) => fret);
    const wide = labelsOf(24, 'bass', 'in', 1100).map(({ fret }) => fret);
    expect(narrow).toEqual(expect.arrayContaining([12, 24]));
    expect(wide).toEqual(expect.arrayContaining([1, 3, 5, 12, 15, 24]));
    expect(wide.length).toBeGreaterThan(narrow.length);
  });

  test("give each side its own string's place", () => {
    const twelfth = (side: 'bass' | 'treble') => labelsOf(24, side, 'in', 900).find(({ fret }) => fret === 12)?.words;
    expect([twelfth('bass'), twelfth('treble')]).toEqual(['13.500', '12.750']);
  });
});
