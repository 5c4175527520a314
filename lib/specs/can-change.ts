import type { SpecItem } from './document';
import { freezeOf, type FreezeStage } from './freeze';
import { dayWords, shortDay } from '@/lib/date-words';

export type CanChange = {
  /** `opened`: frozen, but a change that the owner signed has opened it for the next version. */
  state: 'open' | 'frozen' | 'opened';
  /** When and why, in words for the reader's zone. */
  words: string;
};

type Clock = { stages: readonly FreezeStage[]; openedKeys: ReadonlySet<string>; zone: string; nowMs: number };

/** Whether an item can still change, as it is said beside it; a build that is delivered changes no more. */
export function canChange(item: Pick<SpecItem, 'key' | 'frozenFrom'>, clock: Clock, isDelivered: boolean): CanChange {
  if (isDelivered) return { state: 'frozen', words: 'as delivered' };
  const freeze = freezeOf(item, clock.stages, clock.nowMs);
  if (freeze.state === 'open')
    return {
      state: 'open',
      words:
        freeze.untilMs === null
          ? 'can change until the case closes'
          : `can change until about ${dayWords(freeze.untilMs, clock.zone, clock.nowMs)}, when ${freeze.stageName} begins`,
    };
  const since = `since ${shortDay(freeze.sinceMs, clock.zone)}, when ${freeze.stageName} began`;
  return clock.openedKeys.has(item.key)
    ? { state: 'opened', words: `opened by a signed change; frozen ${since}` }
    : { state: 'frozen', words: `frozen ${since}` };
}
