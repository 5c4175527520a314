import { renderToStaticMarkup } from 'react-dom/server';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { layoutSeries, PLOT_HEIGHT_PX } from '@/components/readings/series-layout';
import { SeriesPlot } from '@/components/readings/series-plot';

const day = 86_400_000;
const start = Date.UTC(2026, 5, 3, 12);
const band = { low: 6, high: 8 };
const points = [14.2, 11.6, 9.1, 7.8].map((value, index) => ({ atMs: start + index * 20 * day, value }));
const plot = (shown = points, zone = 'America/Chicago') =>
  renderToStaticMarkup(
    <SeriesPlot title="Moisture" points={shown} unit="%" band={band} zone={zone} nowMs={start + 90 * day} />,
  );

function laidOut(shown = points, zone = 'UTC') {
  const layout = layoutSeries(shown, band, zone);
  if (!layout) throw new Error('no layout');
  return layout;
}

describe('a series over time', () => {
  test('runs from left to right in the order of its instants, however it was given', () => {
    expect(laidOut([...points].reverse()).points).toEqual(laidOut().points);
    const at = laidOut().points.map(({ xPercent }) => xPercent);
    expect(at).toEqual([...at].sort((a, b) => a - b));
  });

  test('puts more above less, and the band where its ends are', () => {
    const layout = laidOut([
      { atMs: 0, value: 8 },
      { atMs: day, value: 6 },
    ]);
    const [high, low] = layout.points;
    expect(high?.yPx).toBeLessThan(Number(low?.yPx));
    expect(high?.yPx).toBe(layout.band?.topPx);
    expect(low?.yPx).toBeCloseTo((layout.band?.topPx ?? 0) + (layout.band?.heightPx ?? 0), 1);
  });

  test('stays inside its box and free of broken numbers, whatever is read', () => {
    const reading = fc.record({ atMs: fc.integer({ min: 0, max: 4e12 }), value: fc.double({ min: -1e6, max: 1e6 }) });
    fc.assert(
      fc.property(fc.array(reading, { minLength: 1, maxLength: 40 }), (shown) => {
        const layout = layoutSeries(shown, band, 'UTC');
        for (const { xPercent, yPx } of layout?.points ?? []) {
          expect(xPercent >= 0 && xPercent <= 100 && yPx >= 0 && yPx <= PLOT_HEIGHT_PX).toBe(true);
        }
        expect(layout?.linePath ?? '').not.toContain('NaN');
      }),
    );
  });

  test('of one reading is one mark with its date and hour', () => {
    const layout = laidOut(points.slice(0, 1));
    expect(layout.points).toHaveLength(1);
    expect(layout.timeTicks).toEqual([{ words: '3 Jun 12:00', xPercent: 50, anchor: 'middle' }]);
  });

  test('of nothing, or of nothing that is a number, says so', () => {
    expect(plot([])).toContain('Moisture: no readings yet.');
    expect(plot([{ atMs: start, value: Number.NaN }])).toContain('no readings yet');
  });

  test('dates its readings in the zone of the reader', () => {
    const lateEvening = [{ atMs: Date.UTC(2026, 5, 4, 3), value: 7 }];
    expect(laidOut(lateEvening, 'America/Chicago').timeTicks[0]?.words).toContain('3 Jun');
    expect(laidOut(lateEvening, 'Europe/Berlin').timeTicks[0]?.words).toContain('4 Jun');
  });

  test('is said in a sentence, and every figure is in the table', () => {
    const markup = plot();
    expect(markup).toContain('Moisture: 4 readings from 3 June, 14.2 %, to 2 August, 7.8 %.');
    expect(markup).toContain('the last is within');
    for (const { value } of points) expect(markup).toContain(`>${value} %</td>`);
    expect(markup.match(/>outside</g)).toHaveLength(3);
  });

  test('carries no style attribute, which the page would refuse', () => expect(plot()).not.toContain('style='));
});
