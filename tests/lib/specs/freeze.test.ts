import { describe, expect, test } from 'vitest';
import { canChange } from '@/lib/specs/can-change';
import { expectedStartMs, freezeOf, frozenEdits, keepFrozen, type FreezeStage } from '@/lib/specs/freeze';
import { choiceItem, measureItem, smallSpec } from '../../support/spec';

const DAY_MS = 86_400_000;
const NOW_MS = Date.UTC(2026, 11, 1);

const stage = (position: number, key: string, times: Partial<FreezeStage> = {}): FreezeStage => ({
  key,
  name: `The ${key}`,
  position,
  usualDays: 10,
  startedAt: null,
  finishedAt: null,
  ...times,
});

const stages = [
  stage(1, 'wood', { startedAt: NOW_MS - 30 * DAY_MS, finishedAt: NOW_MS - 4 * DAY_MS }),
  stage(2, 'neck', { startedAt: NOW_MS - 4 * DAY_MS }),
  stage(3, 'body'),
  stage(4, 'finish'),
];

describe('an item', () => {
  test('is frozen from the moment its stage begins', () => {
    const freeze = freezeOf(measureItem({ frozenFrom: 'neck' }), stages, NOW_MS);
    expect(freeze).toEqual({ state: 'frozen', stageName: 'The neck', sinceMs: NOW_MS - 4 * DAY_MS });
  });

  test('can change until about when its stage begins: the rest of now and the usual days between', () => {
    const freeze = freezeOf(choiceItem({ frozenFrom: 'finish' }), stages, NOW_MS);
    expect(freeze).toEqual({ state: 'open', stageName: 'The finish', untilMs: NOW_MS + 16 * DAY_MS });
  });

  test('that nothing freezes can always change, as one whose stage the route lacks', () => {
    const never = { state: 'open', stageName: null, untilMs: null };
    expect(freezeOf({ frozenFrom: null }, stages, NOW_MS)).toEqual(never);
    expect(freezeOf({ frozenFrom: 'elsewhere' }, stages, NOW_MS)).toEqual(never);
  });
});

test('a stage that takes longer than usual does not begin the next one in the past', () => {
  const slow = [stage(1, 'neck', { startedAt: NOW_MS - 50 * DAY_MS }), stage(2, 'finish')];
  expect(expectedStartMs({ position: 2 }, slow, NOW_MS)).toBe(NOW_MS);
});

describe('an edit', () => {
  const agreed = smallSpec();
  const edits = (next: typeof agreed, openedKeys: string[] = [], was: typeof agreed | null = agreed) =>
    frozenEdits({ agreed: was, next, stages, openedKeys: new Set(openedKeys) }, NOW_MS);
  const wider = smallSpec(measureItem({ aim: { text: '1.750', unit: 'in' } }), choiceItem());

  test('of a frozen item is refused with the way that is left', () => {
    expect(edits(wider)['items.nut_width.value']).toMatch(/The neck has begun.*change request/);
  });

  test('of an item that is not frozen is free, and so is saving what stands', () => {
    expect(edits(smallSpec(measureItem(), choiceItem({ value: 'satin' })))).toEqual({});
    expect(edits(agreed)).toEqual({});
  });

  test('that takes a frozen item out, or adds one for a stage that has begun, is refused too', () => {
    expect(edits(smallSpec(choiceItem()))['items.nut_width.value']).toMatch(/taken out/);
    const added = smallSpec(...agreed.items, measureItem({ key: 'radius', label: 'Radius' }));
    expect(edits(added)['items.radius.value']).toMatch(/no longer be added/);
  });

  test('cannot slip out of the freeze by naming a later stage', () => {
    expect(edits(smallSpec(measureItem({ frozenFrom: 'finish' }), choiceItem()))).toHaveProperty([
      'items.nut_width.value',
    ]);
  });

  test('is free again for an item that a signed change has opened, and while nothing was agreed', () => {
    expect(edits(wider, ['nut_width'])).toEqual({});
    expect(edits(wider, [], null)).toEqual({});
  });
});

test('a draft that went on while a stage began shows what was agreed for everything frozen', () => {
  const agreed = smallSpec();
  const draft = smallSpec(choiceItem({ value: 'satin' }));
  const ground = { agreed, stages, openedKeys: new Set<string>() };
  expect(keepFrozen({ ...ground, next: draft }, NOW_MS)).toEqual(
    smallSpec(choiceItem({ value: 'satin' }), measureItem()),
  );
  expect(keepFrozen({ ...ground, agreed: null, next: draft }, NOW_MS)).toEqual(draft);
  expect(keepFrozen({ ...ground, openedKeys: new Set(['nut_width']), next: draft }, NOW_MS)).toEqual(draft);
});

test('what can change says until about when, what cannot since when, and a delivered build changes no more', () => {
  const clock = { stages, openedKeys: new Set(['opened']), zone: 'UTC', nowMs: NOW_MS };
  const say = (key: string, frozenFrom: string | null, isDelivered = false) =>
    canChange({ key, frozenFrom }, clock, isDelivered);
  expect(say('a', 'finish')).toEqual({
    state: 'open',
    words: 'can change until about 17 December, when The finish begins',
  });
  expect(say('a', 'neck')).toEqual({ state: 'frozen', words: 'frozen since 27 Nov, when The neck began' });
  expect(say('opened', 'neck').state).toBe('opened');
  expect(say('a', 'finish', true)).toEqual({ state: 'frozen', words: 'as delivered' });
});
