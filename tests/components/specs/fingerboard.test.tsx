import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, test } from 'vitest';
import { FingerboardDrawing } from '@/components/specs/fingerboard-drawing';
import { FretSheet } from '@/components/specs/fret-sheet';
import { FretTable } from '@/components/specs/fret-table';
import { StringBalance } from '@/components/specs/string-balance';
import { StringTrial } from '@/components/specs/string-trial';
import { fingerboard, type FingerboardPlan } from '@/lib/craft/fingerboard';
import { fretSheet } from '@/lib/craft/fret-sheet';
import { stringBalance } from '@/lib/craft/string-balance';
import { readStringSet } from '@/lib/craft/strings';

const one: FingerboardPlan = {
  bassScaleMm: 685.8,
  trebleScaleMm: 685.8,
  perpendicularFret: 0,
  fretCount: 24,
  stringCount: 6,
  nutWidthMm: 43.18,
  lastFretWidthMm: 57,
  inlay: 'dots',
};
const two: FingerboardPlan = { ...one, trebleScaleMm: 647.7, perpendicularFret: 7, inlay: 'blocks' };

function boardOf(plan: FingerboardPlan) {
  const read = fingerboard(plan);
  if (!read.ok) throw new Error(read.message);
  return read.board;
}

function sheetHtml(plan: FingerboardPlan): string {
  const board = boardOf(plan);
  const read = fretSheet(board, 'A4');
  if (!read.ok) throw new Error(read.message);
  return renderToStaticMarkup(<FretSheet sheet={read.sheet} board={board} title="Order Q-2417, version 4" />);
}

function baritoneSet(gauges: string, band: { lowLb: number; highLb: number }) {
  const set = readStringSet('B1 E2 A2 D3 F#3 B3', gauges);
  if (!set.ok) throw new Error(set.message);
  const plan = { strings: set.strings, bassScaleMm: 685.8, trebleScaleMm: 685.8 };
  const read = stringBalance(plan, band);
  if (!read.ok) throw new Error(read.message);
  return { plan, balance: read.balance };
}

function balanceHtml(gauges: string): string {
  const { balance } = baritoneSet(gauges, { lowLb: 19, highLb: 22 });
  return renderToStaticMarkup(<StringBalance balance={balance} />);
}

describe('the fingerboard drawing', () => {
  const html = renderToStaticMarkup(<FingerboardDrawing board={boardOf(one)} unit="in" />);

  test('tells a screen reader what it shows', () => {
    expect(html).toMatch(/role="img" aria-labelledby="([^"]+)-title" aria-describedby="\1-words"/);
    expect(html).toContain('24 frets, 6 strings, scale 27 in');
  });

  test('draws every fret and string, a nut, and two dots at each octave', () => {
    expect(html.match(/class="stroke-fret"/g)).toHaveLength(24 + 6);
    expect(html.match(/<circle/g)).toHaveLength(8 + 2 * 2);
  });

  test('says positions above and below only where they differ', () => {
    const fan = renderToStaticMarkup(<FingerboardDrawing board={boardOf(two)} unit="in" />);
    expect(html).not.toContain('12.750');
    expect(fan).toContain('13.500');
    expect(fan).toContain('12.750');
  });
});

describe('the fret table', () => {
  test('has each slot in both units', () => {
    const html = renderToStaticMarkup(<FretTable table={boardOf(one).table} />);
    expect(html.match(/<tr/g)).toHaveLength(1 + 24 + 2);
    expect(html).toContain('13.500');
    expect(html).toContain('342.90');
  });

  test('has both sides and the skew where there are two scales', () => {
    const html = renderToStaticMarkup(<FretTable table={boardOf(two).table} />);
    for (const words of ['Bass side, in', 'Treble side, in', 'Skew, in', '−0.499', '−12.67']) {
      expect(html).toContain(words);
    }
  });
});

describe('the balance across the strings', () => {
  test('says with a word which strings lie outside the band, and what would bring them in', () => {
    const html = balanceHtml('14 19 26 38 50 62');
    expect(html.match(/above the band/g)).toHaveLength(2);
    expect(html.match(/within the band/g)).toHaveLength(4);
    expect(html).toContain('a .036 would bring it to 21.9 lb');
  });
});

describe('another gauge on one string', () => {
  const trialHtml = (highLb: number) => {
    const { plan, balance } = baritoneSet('14 19 26 38 50 62', { lowLb: 10, highLb });
    return renderToStaticMarkup(<StringTrial plan={plan} strings={balance.strings} />);
  };

  test('starts with what would bring the first string into the band, and says what that does', () => {
    // Weights .00026471 and .00023964 lb/in of the published table at 27 in and 110 Hz, by T = UW (2 L F)^2 / 386.4.
    expect(trialHtml(22)).toContain(
      'A .036 takes A2 from 24.2 to 21.9 lb (97 N), 2.3 lb less, and the set to 126.4 lb (562 N).',
    );
  });

  test('starts with the first string as it is where every string lies in the band', () => {
    const html = trialHtml(90);
    expect(html).toContain('Choose a gauge to see what it does.');
    expect(html.match(/<option value="(plain|wound) /g)).toHaveLength(22 + 33);
  });
});

describe('the sheet to print', () => {
  const html = sheetHtml(one);

  test('is as large as its paper, whatever the screen', () => {
    expect(html.match(/width="210mm" height="297mm" viewBox="0 0 210 297"/g)).toHaveLength(3);
  });

  test('asks on every page to print at 100 % and to check the ruler', () => {
    expect(html.match(/<text[^>]*>Print at 100 % and check the ruler/g)).toHaveLength(3);
  });

  test('shows the same seam on both pages that share it', () => {
    expect(html.match(/>A<\/text>/g)).toHaveLength(4);
    expect(html.match(/>B<\/text>/g)).toHaveLength(4);
  });

  test('draws 100 mm as 100 mm, and the octave at half of the scale from the nut', () => {
    const upright = [...html.matchAll(/<line x1="([\d.]+)" y1="([\d.]+)" x2="\1" y2="([\d.]+)"/g)];
    const rulers = upright.filter(([, x]) => Number(x) > 150);
    const lengths = rulers.map(([, , from, to]) => Number((Number(to) - Number(from)).toFixed(4)));
    expect(lengths).toEqual([100, 101.6, 100, 101.6, 100, 101.6]);
    expect(html).toMatch(/y1="342.9" x2="[-\d.]+" y2="342.9"/);
  });
});

test('nothing here carries a style attribute, which the pages forbid', () => {
  const drawn = renderToStaticMarkup(<FingerboardDrawing board={boardOf(two)} unit="mm" />);
  expect(drawn + sheetHtml(two) + balanceHtml('14 19 26 38 50 62')).not.toContain('style=');
});
