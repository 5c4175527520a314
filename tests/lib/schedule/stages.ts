import { pmfFromWeights, type Pmf } from '@/lib/schedule/pmf';
import type { StageAhead, StageNow } from '@/lib/schedule/walk';

export const evenly = (fromDays: number, toDays: number): Pmf => {
  const days = Array.from({ length: toDays - fromDays + 1 }, (_, i) => fromDays + i);
  return pmfFromWeights(
    days,
    days.map(() => 1),
  );
};

/** A stage with this distribution, as if read from history. */
export const ahead = (name: string, pmf: Pmf | null, minimumWaitDays = 0): StageAhead => ({
  key: name.toLowerCase().replaceAll(' ', '-'),
  name,
  durations: pmf && { pmf, longestDays: pmf.length - 1, buildCount: 20, basis: 'history' },
  minimumWaitDays,
});

export const inStage = (stage: StageAhead, startedOn: string, stoppedDays = 0): StageNow => ({
  ...stage,
  startedOn,
  stoppedDays,
});
