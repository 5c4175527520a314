import { isSame } from './canonical';
import type { SpecDocument, SpecItem } from './document';

/** The times of one stage of a build, as far as a freeze asks for them; days are calendar days. */
export type FreezeStage = {
  key: string;
  name: string;
  position: number;
  usualDays: number;
  startedAt: number | null;
  finishedAt: number | null;
};

export type Freeze =
  /** The stage that makes it has begun. */
  | { state: 'frozen'; stageName: string; sinceMs: number }
  /** Can change until the stage begins, about then; null where nothing freezes it. */
  | { state: 'open'; stageName: string | null; untilMs: number | null };

const DAY_MS = 86_400_000;

/** Whether an item can still change, and until about when. A stage that the route does not have freezes nothing. */
export function freezeOf(item: Pick<SpecItem, 'frozenFrom'>, stages: readonly FreezeStage[], nowMs: number): Freeze {
  const stage = stages.find(({ key }) => key === item.frozenFrom);
  if (!stage) return { state: 'open', stageName: null, untilMs: null };
  if (stage.startedAt !== null) return { state: 'frozen', stageName: stage.name, sinceMs: stage.startedAt };
  return { state: 'open', stageName: stage.name, untilMs: expectedStartMs(stage, stages, nowMs) };
}

/** About when a stage begins: what is left of the stage of now, and the usual days of those between. */
export function expectedStartMs(
  stage: Pick<FreezeStage, 'position'>,
  stages: readonly FreezeStage[],
  nowMs: number,
): number {
  const between = stages.filter(({ position, finishedAt }) => position < stage.position && finishedAt === null);
  return between.reduce((at, { startedAt, usualDays }) => {
    const spentMs = startedAt === null ? 0 : nowMs - startedAt;
    return at + Math.max(0, usualDays * DAY_MS - spentMs);
  }, nowMs);
}

type Edit = {
  /** The last version that was sent; null while nothing has been agreed, and then nothing is frozen. */
  agreed: SpecDocument | null;
  next: SpecDocument;
  stages: readonly FreezeStage[];
  /** Items that a signed change request has opened again. */
  openedKeys: ReadonlySet<string>;
};

/** The same document with every item that may no longer change as it was agreed. */
export function keepFrozen({ agreed, next, stages, openedKeys }: Edit, nowMs: number): SpecDocument {
  if (!agreed) return next;
  const isFrozen = (item: SpecItem) => !openedKeys.has(item.key) && freezeOf(item, stages, nowMs).state === 'frozen';
  const frozen = new Map(agreed.items.filter(isFrozen).map((item) => [item.key, item]));
  const known = new Set(next.items.map(({ key }) => key));
  const missing = [...frozen.values()].filter(({ key }) => !known.has(key));
  return { items: [...next.items.map((item) => frozen.get(item.key) ?? item), ...missing] };
}

/** A sentence for every edit that a begun stage forbids, at `items.<key>.value`. */
export function frozenEdits({ agreed, next, stages, openedKeys }: Edit, nowMs: number): Record<string, string> {
  if (!agreed) return {};
  const sentences: Record<string, string> = {};
  for (const key of new Set([...agreed.items, ...next.items].map((item) => item.key))) {
    if (openedKeys.has(key)) continue;
    const before = agreed.items.find((item) => item.key === key);
    const after = next.items.find((item) => item.key === key);
    const item = before ?? after;
    if (!item || isSame(before, after)) continue;
    const freeze = freezeOf(item, stages, nowMs);
    if (freeze.state === 'frozen')
      sentences[`items.${key}.value`] = frozenSentence(item, before, after, freeze.stageName);
  }
  return sentences;
}

function frozenSentence(item: SpecItem, before: unknown, after: unknown, stageName: string): string {
  if (!before)
    return `${stageName} has begun, so “${item.label}” can no longer be added. Choose a stage that lies ahead.`;
  const what = after ? 'changed' : 'taken out';
  return `${stageName} has begun, so “${item.label}” can no longer be ${what} here. A wish for it is a change request, with its price and days, that the owner signs.`;
}
