import { judge } from '../../lib/schedule/calibration';
import { backtest } from './backtest';
import type { Bench, Row } from './row';

const SEED = 1;
const AIM_PERCENT = 80;

/** Percent of windows that held, which must come within `reach` of eight in ten: too many is as wrong as too few. */
function within(name: string, share: number, reach: number): Row {
  const value = 100 * share;
  const isMet = Math.abs(value - AIM_PERCENT) <= reach;
  return { name, value, floor: AIM_PERCENT, ratio: value / AIM_PERCENT, target: reach, unit: '% held', isMet };
}

/** A thousand builds of a made-up shop: every window with what was known on its day, judged by the day it was ready. */
export const windowCoverage: Bench = {
  name: 'window-coverage',
  run: async () => {
    const { all, byStage } = judge(backtest(SEED).windows);
    // Of all stages the one farthest from eight in ten.
    const farthest = byStage
      .map(({ coverage }) => coverage.share)
      .sort((one, other) => Math.abs(other - 0.8) - Math.abs(one - 0.8))[0];
    return [within('window-coverage', all?.share ?? 0, 3), within('window-coverage-stage', farthest ?? 0, 8)];
  },
};
