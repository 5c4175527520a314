import type { StageChoice } from './stage-choice';
import type { BenchItem } from '@/lib/readings/plan';

/** The spec items that entries of this stage are expected to show. */
export function provenAt(items: BenchItem[], stages: Pick<StageChoice, 'id' | 'key'>[], stageId: string): BenchItem[] {
  const stage = stages.find(({ id }) => id === stageId);
  return stage ? items.filter((item) => item.provenAt === stage.key) : [];
}
