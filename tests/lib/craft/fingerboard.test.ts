import { describe, expect, test } from 'vitest';
import fc from 'fast-check';
import { fingerboard, type Fingerboard, type FingerboardPlan } from '@/lib/craft/fingerboard';
import { fingerboardWords } from '@/lib/craft/fret-words';
import { fretSheet, type FretSheet, type Paper } from '@/lib/craft/fret-sheet';
import { markedFrets } from '@/lib/craft/inlays';

const six: FingerboardPlan = {
  bassScaleMm: 647.7,
  trebleScaleMm: 647.7,
  perpendicularFret: 0,
  fretCount: 24,
  stringCount: 6,
  nutWidthMm: 43,
  lastFretWidthMm: 57,
  inlay: 'dots',
};
const fan: FingerboardPlan = { ...six, bassScaleMm: 685.8, perpendicularFret: 7, stringCount: 7 };

function boardOf(plan: FingerboardPlan): Fingerboard {
  const read = fingerboard(plan);
  if (!read.ok) throw new Error(read.message);
  return read.board;
}

function sheetOf(plan: FingerboardPlan, paper: Paper): FretSheet {
  const read = fretSheet(boardOf(plan), paper);
  if (!read.ok) throw new Error(read.message);
  return read.sheet;
}

describe('the fingerboard to true scale', () => {
  test('has its widths at the nut and at the last fret', () => {
    const { frets } = boardOf(six);
    const width = (fret: number) => (frets[fret]?.bass.y ?? 0) - (frets[fret]?.treble.y ?? 0);
    expect(width(0)).toBeCloseTo(43, 9);
    expect(width(24)).toBeCloseTo(57, 9);
  });

  test('has the 12th fret at half of the scale, square to the centre line', () => {
    const octave = boardOf(six).frets[12];
    expect(octave?.bass.x).toBeCloseTo(647.7 / 2, 9);
    expect(octave?.treble.x).toBeCloseTo(647.7 / 2, 9);
  });

  test('lets each outer string cross each fret of two scales at the place of the table', () => {
    const { frets, strings, table } = boardOf(fan);
    const [treble, bass] = [strings[0], strings.at(-1)];
    for (const fret of frets) {
      const row = table.rows[fret.fret];
      for (const [string, place] of [
        [treble, row?.treble],
        [bass, row?.bass],
      ] as const) {
        const x = place?.fromPerpendicularMm ?? Number.NaN;
        const along = (x - fret.treble.x) / (fret.bass.x - fret.treble.x || 1);
        const share = (x - (string?.nut.x ?? 0)) / ((string?.bridge.x ?? 0) - (string?.nut.x ?? 0));
        const yOfString = (string?.nut.y ?? 0) + share * ((string?.bridge.y ?? 0) - (string?.nut.y ?? 0));
        const yOfFret = fret.treble.y + along * (fret.bass.y - fret.treble.y);
        if (fret.fret !== fan.perpendicularFret) expect(yOfFret).toBeCloseTo(yOfString, 6);
      }
    }
    expect(frets[7]?.bass.x).toBeCloseTo(frets[7]?.treble.x ?? Number.NaN, 9);
  });

  test('keeps every string on the board and in order from treble to bass', () => {
    const counts = fc.integer({ min: 2, max: 12 });
    fc.assert(
      fc.property(counts, fc.integer({ min: 0, max: 24 }), (stringCount, perpendicularFret) => {
        const { strings } = boardOf({ ...fan, stringCount, perpendicularFret });
        const heights = strings.map(({ nut }) => nut.y);
        expect(heights).toEqual(heights.toSorted((a, b) => a - b));
        expect(Math.max(...heights.map(Math.abs))).toBeLessThan(43 / 2 + 2);
      }),
    );
  });

  test('puts each dot midway between its fret and the one before, two at the octaves', () => {
    const { inlays, frets } = boardOf(six);
    const third = inlays.find(({ fret }) => fret === 3);
    const middle = ((frets[2]?.bass.x ?? 0) + (frets[3]?.bass.x ?? 0)) / 2;
    expect(third?.kind === 'dot' && third.centre.x).toBeCloseTo(middle, 9);
    expect(third?.kind === 'dot' && third.centre.y).toBeCloseTo(0, 9);
    expect(inlays.filter(({ fret }) => fret === 12)).toHaveLength(2);
    expect(inlays.filter(({ fret }) => fret === 24)).toHaveLength(2);
  });

  test('marks 3, 5, 7, 9, 12 and the same an octave up', () => {
    expect(markedFrets(24).map(({ fret }) => fret)).toEqual([3, 5, 7, 9, 12, 15, 17, 19, 21, 24]);
    expect(markedFrets(22).filter(({ isDouble }) => isDouble)).toEqual([{ fret: 12, isDouble: true }]);
    expect(boardOf({ ...six, inlay: 'none' }).inlays).toEqual([]);
  });

  test('keeps blocks between their frets', () => {
    const { inlays, frets } = boardOf({ ...six, inlay: 'blocks' });
    for (const mark of inlays) {
      const [before, after] = [frets[mark.fret - 1]?.bass.x ?? 0, frets[mark.fret]?.bass.x ?? 0];
      const xs = mark.kind === 'block' ? mark.corners.map(({ x }) => x) : [];
      expect(xs).toHaveLength(4);
      expect(Math.min(...xs)).toBeGreaterThan(before);
      expect(Math.max(...xs)).toBeLessThan(after);
    }
  });

  test('is described for somebody who does not see it', () => {
    expect(fingerboardWords(boardOf(six), 'in')).toBe(
      '24 frets, 6 strings, scale 25.5 in; 1.693 in wide at the nut, 2.244 in at the last fret. ' +
        'Fret 12 lies 12.750 in from the nut. Dots at 3, 5, 7, 9, 12, 15, 17, 19, 21 and 24, two each at 12 and 24.',
    );
  });

  test.each([
    [{ perpendicularFret: 30 }, /on the board/],
    [{ stringCount: 0 }, /number of strings/],
    [{ nutWidthMm: 1.7 }, /unit/],
    [{ nutWidthMm: Number.NaN }, /unit/],
    [{ lastFretWidthMm: 40 }, /at least as wide/],
    [{ edgeMm: 30 }, /must lie on the board/],
    [{ overhangMm: -1 }, /behind the last fret/],
  ])('%o is refused with what to do', (change, sentence) => {
    const read = fingerboard({ ...six, ...change });
    expect(read.ok ? 'made' : read.message).toMatch(sentence);
  });
});

describe('the sheet to print at 1:1', () => {
  test.each(['A4', 'Letter'] as const)('covers the whole board on %s, each seam marked on both its pages', (paper) => {
    for (const plan of [six, fan, { ...six, bassScaleMm: 863.6, trebleScaleMm: 863.6 }]) {
      const { pages, boardTopMm, heightMm, marginMm } = sheetOf(plan, paper);
      const { bounds } = boardOf(plan);
      expect(pages[0]?.fromMm).toBeLessThan(bounds.left);
      expect(pages.at(-1)?.toMm).toBeGreaterThan(bounds.right);
      for (const [i, page] of pages.entries()) {
        expect(boardTopMm + page.toMm - page.fromMm).toBeLessThanOrEqual(heightMm - marginMm);
        const next = pages[i + 1];
        const seam = page.marks.at(-1);
        if (!next) continue;
        expect(next.fromMm).toBeLessThan(page.toMm);
        expect(next.marks[0]).toEqual(seam);
        expect(seam?.boardXMm).toBeGreaterThan(next.fromMm);
        expect(seam?.boardXMm).toBeLessThan(page.toMm);
      }
    }
  });

  test('has no page without board', () => {
    const { pages } = sheetOf(six, 'A4');
    const { bounds } = boardOf(six);
    expect(pages.at(-1)?.fromMm).toBeLessThan(bounds.right);
    expect(pages).toHaveLength(3);
  });

  test('a board too wide for the paper is refused with what to do', () => {
    expect(fretSheet(boardOf({ ...six, nutWidthMm: 120, lastFretWidthMm: 140 }), 'A4')).toMatchObject({ ok: false });
  });
});
