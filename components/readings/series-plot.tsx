import { clsx } from 'clsx';
import { useId } from 'react';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import { figure } from '@/lib/craft/figure';
import { clockWords, dayWords } from '@/lib/date-words';
import { layoutSeries, PLOT_HEIGHT_PX, type Band, type Layout, type SeriesPoint } from './series-layout';

type SeriesPlotProps = {
  /** What the series is of, as a heading: "Moisture of the boards". */
  title: string;
  points: SeriesPoint[];
  unit: string;
  /** What is aimed for, drawn as a band. */
  band?: Band;
  /** The reader's time zone. */
  zone: string;
  /** The instant of this page, so that dates of another year say so. */
  nowMs: number;
  decimals?: number;
  className?: string;
};

/**
 * Readings over time as a line, with the aim as a band and the same figures as a table below. It is as wide as its place and
 * drawn without scaled text, so that it can be read on a phone. Drawn on the server; it needs no script.
 */
export function SeriesPlot({ title, points, unit, band, zone, nowMs, decimals = 1, className }: SeriesPlotProps) {
  const layout = layoutSeries(points, band, zone);
  if (!layout) return <p className={clsx('text-soft', className)}>{title}: no readings yet.</p>;
  const shown = (value: number) => [figure(value, decimals), unit].filter(Boolean).join(' ');
  return (
    <figure className={clsx('grid gap-2', className)}>
      <figcaption className="heading">
        {title}
        {unit && <span className="font-normal text-soft">, {unit}</span>}
      </figcaption>
      <Plot layout={layout} summary={seriesSummary(title, layout.points, band, shown, zone, nowMs)} />
      <details>
        <summary className="inline-flex min-h-11 items-center text-finish-deep underline underline-offset-4">
          The figures as a table
        </summary>
        <SeriesTable title={title} points={layout.points} band={band} shown={shown} zone={zone} nowMs={nowMs} />
      </details>
    </figure>
  );
}

function Plot({ layout, summary }: { layout: Layout; summary: string }) {
  const summaryId = useId();
  return (
    <div className="flex gap-2 text-sm">
      <svg
        aria-hidden="true"
        focusable="false"
        width="44"
        height={PLOT_HEIGHT_PX}
        className="flex-none overflow-visible"
      >
        {layout.valueTicks.map(({ words, yPx }) => (
          <text key={yPx} x="44" y={yPx} dy="0.32em" textAnchor="end" className="narrow fill-soft">
            {words}
          </text>
        ))}
      </svg>
      <svg
        role="img"
        aria-labelledby={summaryId}
        width="100%"
        height={PLOT_HEIGHT_PX + 26}
        className="min-w-0 flex-1 overflow-visible"
      >
        <title id={summaryId}>{summary}</title>
        <PlotGround layout={layout} />
        <svg viewBox={`0 0 100 ${PLOT_HEIGHT_PX}`} width="100%" height={PLOT_HEIGHT_PX} preserveAspectRatio="none">
          <path
            d={layout.linePath}
            vectorEffect="non-scaling-stroke"
            className="fill-none stroke-finish-deep"
            strokeWidth="2"
          />
        </svg>
        {layout.points.map((point) => (
          <circle
            key={point.atMs}
            cx={`${point.xPercent}%`}
            cy={point.yPx}
            r="4"
            strokeWidth="2"
            className={clsx('stroke-sheet', point.isWithin ? 'fill-finish-deep' : 'fill-late')}
          />
        ))}
      </svg>
    </div>
  );
}

function PlotGround({ layout: { band, valueTicks, timeTicks } }: { layout: Layout }) {
  return (
    <>
      {band && <rect y={band.topPx} width="100%" height={band.heightPx} className="fill-finish-wash" />}
      {valueTicks.map(({ yPx }) => (
        <line key={yPx} x1="0" x2="100%" y1={yPx} y2={yPx} className="stroke-line" />
      ))}
      {timeTicks.map(({ words, xPercent, anchor }) => (
        <text
          key={xPercent}
          x={`${xPercent}%`}
          y={PLOT_HEIGHT_PX + 18}
          textAnchor={anchor}
          className="narrow fill-soft"
        >
          {words}
        </text>
      ))}
    </>
  );
}

type TableProps = Pick<SeriesPlotProps, 'title' | 'band' | 'zone' | 'nowMs'> & {
  points: Layout['points'];
  shown: (value: number) => string;
};

function SeriesTable({ title, points, band, shown, zone, nowMs }: TableProps) {
  const columns = [
    { key: 'when', label: 'When' },
    { key: 'value', label: 'Reading', isNumeric: true },
    ...(band ? [{ key: 'aim', label: `Aim ${shown(band.low)} to ${shown(band.high)}` }] : []),
  ];
  return (
    <Table caption={title} columns={columns}>
      {points.map(({ atMs, value, isWithin }) => (
        <Row key={atMs}>
          <RowHead>
            {dayWords(atMs, zone, nowMs)}, {clockWords(atMs, zone)}
          </RowHead>
          <Cell isNumeric>{shown(value)}</Cell>
          {band && <Cell className={clsx(!isWithin && 'text-late')}>{isWithin ? 'within' : 'outside'}</Cell>}
        </Row>
      ))}
    </Table>
  );
}

/** The whole plot in a sentence, for who does not see it. */
function seriesSummary(
  title: string,
  points: Layout['points'],
  band: Band | undefined,
  shown: (value: number) => string,
  zone: string,
  nowMs: number,
): string {
  const [first] = points;
  const last = points.at(-1);
  if (!first || !last) return title;
  const when = (atMs: number) => dayWords(atMs, zone, nowMs);
  const aim = band
    ? ` The aim is ${shown(band.low)} to ${shown(band.high)}; the last is ${last.isWithin ? 'within' : 'outside'}.`
    : '';
  if (points.length === 1) return `${title}: ${shown(first.value)} on ${when(first.atMs)}.${aim}`;
  return (
    `${title}: ${points.length} readings from ${when(first.atMs)}, ${shown(first.value)}, ` +
    `to ${when(last.atMs)}, ${shown(last.value)}.${aim}`
  );
}
