import { scaleLinear } from 'd3-scale';
import { curveStepAfter, line } from 'd3-shape';
import { dayNumber } from '@/lib/schedule/days';

export const CURVE_HEIGHT_PX = 200;

type Point = { on: string; probability: number };

export type CurveLayout = {
  /** In a box 100 wide and `CURVE_HEIGHT_PX` high. */
  path: string;
  band: { fromPercent: number; widthPercent: number };
  levels: { words: string; yPx: number }[];
  ends: { on: string; xPercent: number; anchor: 'start' | 'end' }[];
};

const round = (value: number) => Number(value.toFixed(2));
const LEVELS = [0, 0.5, 1];

/** Where a curve and its window stand in the plot; null for a curve without a second day. */
export function layoutCurve(curve: readonly Point[], earliestOn: string, latestOn: string): CurveLayout | null {
  const first = curve[0]?.on;
  const last = curve.at(-1)?.on;
  if (!first || !last || first === last) return null;
  const from = Math.min(dayNumber(first), dayNumber(earliestOn));
  const to = Math.max(dayNumber(last), dayNumber(latestOn));
  const x = scaleLinear([from, to], [0, 100]);
  const y = scaleLinear([0, 1], [CURVE_HEIGHT_PX - 1, 1]);
  const steps = line<Point>(
    ({ on }) => round(x(dayNumber(on))),
    ({ probability }) => round(y(probability)),
  ).curve(curveStepAfter);
  const start = round(x(dayNumber(earliestOn)));
  return {
    path: steps([{ on: first, probability: 0 }, ...curve]) ?? '',
    band: { fromPercent: start, widthPercent: round(x(dayNumber(latestOn)) - start) },
    levels: LEVELS.map((level) => ({ words: `${level * 10} in 10`, yPx: round(y(level)) })),
    ends: [
      { on: first, xPercent: 0, anchor: 'start' },
      { on: last, xPercent: 100, anchor: 'end' },
    ],
  };
}
