import { describe, expect, test } from 'vitest';
import { draftReducer, isBlank, problemOf, type Draft, type DraftEvent } from '@/components/bench/draft-state';
import { blankDraft, fromKept, toKept } from '@/components/bench/kept-draft';
import { entryFrom, eventOf } from '@/components/bench/post-entry';
import type { StageChoice } from '@/components/bench/stage-choice';
import { benchItemOf, planReadings, type BenchBuild } from '@/lib/readings/plan';
import { readTyped, standOf } from '@/lib/readings/read-typed';
import { nothingTyped, type TypedReadings } from '@/lib/readings/typed';
import { choiceItem, measureItem } from '../../support/spec';

const stages: StageChoice[] = [
  { id: 'stage-neck', key: 'neck', name: 'Neck', work: 'neck', state: 'now' },
  { id: 'stage-finish', key: 'finish', name: 'Finish', work: 'finish', state: 'ahead' },
];
const items = [measureItem(), choiceItem()].map(benchItemOf);
const bench: BenchBuild = { items, scaleLengthIn: 25.5, coats: [], lastCoatAtMs: null };

const run = (draft: Draft, ...events: DraftEvent[]) => events.reduce(draftReducer, draft);

/** What the panel tells when these fields are typed at that stage. */
function typedAt(stageId: string, over: Partial<TypedReadings>): DraftEvent {
  const stage = stages.find(({ id }) => id === stageId);
  if (!stage) throw new Error(`no stage ${stageId}`);
  const typed = { ...nothingTyped, ...over };
  return { type: 'reading-typed', typed, stand: standOf(stageId, readTyped(typed, planReadings(stage, bench))) };
}

const nut = (text: string) => typedAt('stage-neck', { measures: { 'item:nut_width': text } });
const sent = (draft: Draft) => entryFrom({ draft, orderNumber: 'Q-1', stages, items, photos: [] });

describe('readings of a draft', () => {
  test('are sent with the entry, and alone are entry enough', () => {
    const draft = run(blankDraft('key'), nut('1.701'));
    expect(problemOf(draft)).toBeNull();
    expect(sent(draft)).toMatchObject({
      stageId: 'stage-neck',
      readings: [{ itemKey: 'nut_width', value: { measured: { text: '1.701', unit: 'in' } } }],
    });
  });

  test('out of tolerance do not stand in the way', () => {
    const draft = run(blankDraft('key'), nut('1.9'));
    expect(draft.readings.stand?.outsideCount).toBe(1);
    expect(problemOf(draft)).toBeNull();
    expect(sent(draft).readings).toHaveLength(1);
  });

  test('that cannot be meant do, with a sentence, until they are mended', () => {
    const draft = run(blankDraft('key'), nut('43'));
    const problem = problemOf(draft);
    expect(problem?.fields.readings).toMatch(/cannot be meant/);
    const refused = run(draft, { type: 'send-refused', problem: problem ?? { fields: {} } }, nut('43 mm'));
    expect(refused.posting).toMatchObject({ step: 'writing', problem: { isTouched: true } });
    expect(problemOf(refused)).toBeNull();
  });

  test('hold the stage they were taken at, even if the build moves on meanwhile', () => {
    const draft = run(blankDraft('key'), nut('1.7'));
    const later: StageChoice[] = stages.map((stage) => ({
      ...stage,
      state: stage.id === 'stage-neck' ? 'done' : 'now',
    }));
    const entry = entryFrom({ draft, orderNumber: 'Q-1', stages: later, items, photos: [] });
    expect(entry).toMatchObject({ stageId: 'stage-neck', readings: [{ itemKey: 'nut_width' }] });
  });

  test('stay typed when another stage is chosen, and nothing is posted until they were read for it', () => {
    const moved = run(blankDraft('key'), nut('1.7'), { type: 'stage-chosen', stageId: 'stage-finish' });
    expect(moved.readings.typed.measures).toEqual({ 'item:nut_width': '1.7' });
    expect(problemOf(moved)?.fields.readings).toMatch(/not been read/);
    const read = run(moved, typedAt('stage-finish', moved.readings.typed));
    expect(sent(read)).toMatchObject({ stageId: 'stage-finish', readings: [] });
    const back = run(read, { type: 'stage-chosen', stageId: 'stage-neck' }, nut('1.7'));
    expect(sent(back).readings).toHaveLength(1);
  });

  test('go under no other stage than the one they were taken at', () => {
    const draft = run(blankDraft('key'), nut('1.7'));
    const without = stages.filter(({ id }) => id !== 'stage-neck');
    const entry = entryFrom({ draft, orderNumber: 'Q-1', stages: without, items, photos: [] });
    expect(entry).toMatchObject({ stageId: 'stage-finish', readings: [] });
  });

  test('make a draft worth keeping', () => {
    expect(isBlank(blankDraft('key'))).toBe(true);
    expect(isBlank(run(blankDraft('key'), nut('1.')))).toBe(false);
  });

  test('refused by the shop are said at the readings, as are ticks at theirs', () => {
    const answer = { kind: 'status', status: 422, fields: { 'readings.2': 'Write 50.', proves: 'Reload.' } } as const;
    expect(eventOf(answer)).toMatchObject({ problem: { fields: { readings: 'Write 50.', proves: 'Reload.' } } });
  });
});

describe('what an entry shows', () => {
  const tick = (itemKey: string, isShown = true): DraftEvent => ({ type: 'proof-marked', itemKey, isShown });

  test('is what was ticked for its stage', () => {
    const draft = run(blankDraft('key'), tick('nut_width'), tick('nut_width'), tick('gloss'));
    expect(sent(draft).proves).toEqual(['nut_width']);
    expect(sent(run(draft, { type: 'stage-chosen', stageId: 'stage-finish' })).proves).toEqual(['gloss']);
    expect(sent(run(draft, tick('nut_width', false))).proves).toEqual([]);
  });

  test('leaves out an item that the spec no longer has', () => {
    expect(sent(run(blankDraft('key'), tick('gone'))).proves).toEqual([]);
  });
});

describe('on the phone', () => {
  test('readings and ticks are kept as typed, and can be sent without opening them again', () => {
    const written = run(blankDraft('key'), nut('1.701'), { type: 'proof-marked', itemKey: 'nut_width', isShown: true });
    const back = fromKept({ draft: structuredClone(toKept(written)), photos: [] }, 'other');
    expect(back).toMatchObject({ readings: written.readings, proves: ['nut_width'] });
    expect(sent(back)).toEqual(sent(written));
  });

  test('a draft from before there were readings opens, and is sent with none', () => {
    const older = { ...toKept(blankDraft('key')), readings: undefined, proves: undefined };
    const back = fromKept({ draft: older, photos: [] }, 'other');
    expect(back.readings).toEqual({ typed: nothingTyped, stand: null });
    expect(sent(back)).toMatchObject({ readings: [], proves: [] });
  });

  test('a draft from before a field was added has that field empty', () => {
    const kept = toKept(run(blankDraft('key'), nut('1.7')));
    const typed = { ...kept.readings?.typed, papers: undefined };
    const draft = JSON.parse(JSON.stringify({ ...kept, readings: { typed, stand: null } }));
    expect(fromKept({ draft, photos: [] }, 'other').readings.typed).toMatchObject({
      papers: '',
      measures: { 'item:nut_width': '1.7' },
    });
  });
});
