import type { StageRest } from '../schedule/quiet';
import type { Work } from '../work';

/** Where a stage is done, with its article: "the wood room", "our finish department". */
export function placeOf(department: string): string {
  const name = department.charAt(0).toLowerCase() + department.slice(1);
  return / room$/.test(name) ? `the ${name}` : `our ${name} department`;
}

/** What a stage does to a build: where nobody can hurry it, wood rests and finish cures. */
export function restOf(work: Work, minimumWaitDays: number): StageRest {
  if (minimumWaitDays === 0) return 'is worked on';
  return work === 'finish' ? 'cures' : 'rests';
}
