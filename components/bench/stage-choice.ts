import type { Work } from '@/lib/work';

export type StageChoice = { id: string; key: string; name: string; work: Work; state: 'done' | 'now' | 'ahead' };

/** The stage an entry belongs to: the chosen one, or that of now; a build not begun is at its first, a finished one at its last. */
export function stageOf(stages: Pick<StageChoice, 'id' | 'state'>[], chosenId: string | null): string {
  const chosen = stages.find(({ id }) => id === chosenId);
  const now = stages.find(({ state }) => state === 'now') ?? stages.find(({ state }) => state === 'ahead');
  return (chosen ?? now ?? stages.at(-1))?.id ?? '';
}
