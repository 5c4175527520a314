import { scaleLinear } from 'd3-scale';
import { line } from 'd3-shape';
import { clockWords, shortDay } from '@/lib/date-words';

/** An instant in milliseconds since 1970 and what was read then. */
export type SeriesPoint = { atMs: number; value: number };
export type Band = { low: number; high: number };

export const PLOT_HEIGHT_PX = 180;

/** Room so that the first and last mark are not cut by the edge. */
const SIDE_PERCENT = 2;
const DAY_MS = 86_400_000;
const TIME_TICKS = 3;
const VALUE_TICKS = 4;

export type Layout = {
  points: (SeriesPoint & { xPercent: number; yPx: number; isWithin: boolean })[];
  /** In a box 100 wide and `PLOT_HEIGHT_PX` high. */
  linePath: string;
  band: { topPx: number; heightPx: number } | null;
  valueTicks: { words: string; yPx: number }[];
  timeTicks: { words: string; xPercent: number; anchor: 'start' | 'middle' | 'end' }[];
};

/**
 * Where the readings of a series stand in its plot, oldest first; null when there are none. What is no number is left out.
 * Only the last of several readings of one instant is kept.
 */
export function layoutSeries(points: SeriesPoint[], band: Band | undefined, zone: string): Layout | null {
  const sorted = inOrder(points);
  const [first] = sorted;
  const last = sorted.at(-1);
  if (!first || !last) return null;
  const x = scaleLinear([first.atMs, last.atMs], [SIDE_PERCENT, 100 - SIDE_PERCENT]);
  const y = valueScale(sorted, band);
  const placed = sorted.map((point) => ({
    ...point,
    xPercent: round(x(point.atMs)),
    yPx: round(y(point.value)),
    isWithin: !band || (point.value >= band.low && point.value <= band.high),
  }));
  const path = line<(typeof placed)[number]>(
    (point) => point.xPercent,
    (point) => point.yPx,
  );
  return {
    points: placed,
    linePath: path(placed) ?? '',
    band: band ? { topPx: round(y(band.high)), heightPx: round(y(band.low) - y(band.high)) } : null,
    valueTicks: y
      .ticks(VALUE_TICKS)
      .map((value) => ({ words: y.tickFormat(VALUE_TICKS)(value), yPx: round(y(value)) })),
    timeTicks: timeTicks(first.atMs, last.atMs, x, zone),
  };
}

function inOrder(points: SeriesPoint[]): SeriesPoint[] {
  const known = points.filter(({ atMs, value }) => Number.isFinite(atMs) && Number.isFinite(value));
  return [...new Map(known.map((point) => [point.atMs, point])).values()].sort((a, b) => a.atMs - b.atMs);
}

/** From the least to the most of readings and band, with air above and below; a flat series gets air of its own. */
function valueScale(points: SeriesPoint[], band: Band | undefined) {
  const values = [...points.map(({ value }) => value), ...(band ? [band.low, band.high] : [])];
  const [least, most] = [Math.min(...values), Math.max(...values)];
  const air = (most - least) * 0.1 || Math.abs(most) * 0.1 || 1;
  return scaleLinear([least - air, most + air], [PLOT_HEIGHT_PX, 0]);
}

/** A few instants along the axis in words of the reader's zone: days, or clock times within two days. */
function timeTicks(firstMs: number, lastMs: number, x: (ms: number) => number, zone: string): Layout['timeTicks'] {
  const isShort = lastMs - firstMs < 2 * DAY_MS;
  const words = (ms: number) => (isShort ? `${shortDay(ms, zone)} ${clockWords(ms, zone)}` : shortDay(ms, zone));
  if (firstMs === lastMs) return [{ words: words(firstMs), xPercent: 50, anchor: 'middle' }];
  const anchors = ['start', 'middle', 'end'] as const;
  return Array.from({ length: TIME_TICKS }, (_, index) => {
    const ms = firstMs + ((lastMs - firstMs) * index) / (TIME_TICKS - 1);
    return { words: words(ms), xPercent: round(x(ms)), anchor: anchors[index] ?? 'middle' };
  }).filter((tick, index, ticks) => ticks.findIndex((other) => other.words === tick.words) === index);
}

const round = (value: number) => Number(value.toFixed(2));
