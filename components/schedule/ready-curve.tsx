import { useId } from 'react';
import { CURVE_HEIGHT_PX, layoutCurve } from './ready-curve-layout';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import { dateWords } from '@/lib/schedule/window-words';

type ReadyCurveProps = {
  curve: readonly { on: string; probability: number }[];
  earliestOn: string;
  latestOn: string;
  today: string;
};

const inTen = (probability: number) => `${(probability * 10).toFixed(1).replace(/\.0$/, '')} in 10`;

/** How likely it is that a build is ready by a day, with its window as a band; the figures as a table below. */
export function ReadyCurve({ curve, earliestOn, latestOn, today }: ReadyCurveProps) {
  const id = useId();
  const layout = layoutCurve(curve, earliestOn, latestOn);
  if (!layout) return null;
  const summary = `How likely it is ready by a day, from ${dateWords(layout.ends[0]?.on ?? earliestOn, today)} to ${dateWords(layout.ends[1]?.on ?? latestOn, today)}; the band is the window.`;
  return (
    <figure className="grid gap-2">
      <figcaption className="heading">Ready by that day, so many times in 10</figcaption>
      <div className="flex gap-2 text-sm">
        <svg
          aria-hidden="true"
          focusable="false"
          width="52"
          height={CURVE_HEIGHT_PX}
          className="flex-none overflow-visible"
        >
          {layout.levels.map(({ words, yPx }) => (
            <text key={words} x="52" y={yPx} dy="0.32em" textAnchor="end" className="narrow fill-soft">
              {words}
            </text>
          ))}
        </svg>
        <svg role="img" aria-labelledby={id} width="100%" height={CURVE_HEIGHT_PX + 26} className="min-w-0 flex-1">
          <title id={id}>{summary}</title>
          <rect
            x={`${layout.band.fromPercent}%`}
            width={`${layout.band.widthPercent}%`}
            height={CURVE_HEIGHT_PX}
            className="fill-finish-wash"
          />
          {layout.levels.map(({ words, yPx }) => (
            <line key={words} x1="0" x2="100%" y1={yPx} y2={yPx} className="stroke-line" />
          ))}
          <svg viewBox={`0 0 100 ${CURVE_HEIGHT_PX}`} width="100%" height={CURVE_HEIGHT_PX} preserveAspectRatio="none">
            <path
              d={layout.path}
              vectorEffect="non-scaling-stroke"
              strokeWidth="2"
              className="fill-none stroke-finish-deep"
            />
          </svg>
          {layout.ends.map(({ on, xPercent, anchor }) => (
            <text key={on} x={`${xPercent}%`} y={CURVE_HEIGHT_PX + 18} textAnchor={anchor} className="narrow fill-soft">
              {dateWords(on, today)}
            </text>
          ))}
        </svg>
      </div>
      <details>
        <summary className="inline-flex min-h-11 items-center text-finish-deep underline underline-offset-4">
          The figures as a table
        </summary>
        <Table
          caption="Ready by a day"
          columns={[
            { key: 'on', label: 'By' },
            { key: 'p', label: 'Ready', isNumeric: true },
          ]}
        >
          {curve.map(({ on, probability }) => (
            <Row key={on}>
              <RowHead>{dateWords(on, today)}</RowHead>
              <Cell isNumeric>{inTen(probability)}</Cell>
            </Row>
          ))}
        </Table>
      </details>
    </figure>
  );
}
