import { describe, expect, test } from 'vitest';
import { edit, startOf, type EditState } from '@/components/specs/edit/edit-state';
import { choiceItem, measureItem, smallSpec } from '../../support/spec';

const saved = { document: smallSpec(), revision: 3, editedBy: 'Petra Novotna' };
const satin = choiceItem({ value: 'satin' });
const wide = measureItem({ aim: { text: '1.750', unit: 'in' } });
const later = (...items: Parameters<typeof smallSpec>) => ({
  document: smallSpec(...items),
  revision: 4,
  editedBy: 'Ines Barros',
});

const typing = (...items: Parameters<typeof smallSpec>): EditState => ({
  ...startOf(saved),
  document: smallSpec(...items),
});

describe('what is typed', () => {
  test('stays when somebody else has saved, with what only they changed taken over', () => {
    const state = edit(typing(wide, choiceItem()), {
      kind: 'saved elsewhere or here',
      saved: later(measureItem(), satin),
    });
    expect(state.document).toEqual(smallSpec(wide, satin));
    expect(state.saved.revision).toBe(4);
    expect(state.meanwhile).toEqual({ by: 'Ines Barros', takenKeys: ['gloss'], clashes: [] });
  });

  test('stays where both changed the same, until theirs is taken', () => {
    const theirs = measureItem({ aim: { text: '1.650', unit: 'in' } });
    const state = edit(typing(wide, choiceItem()), {
      kind: 'saved elsewhere or here',
      saved: later(theirs, choiceItem()),
    });
    expect(state.document).toEqual(smallSpec(wide, choiceItem()));
    const taken = edit(state, { kind: 'take theirs', key: 'nut_width' });
    expect(taken.document).toEqual(smallSpec(theirs, choiceItem()));
    expect(taken.meanwhile?.clashes).toEqual([]);
  });

  test('while one’s own saving is under way is no clash with it', () => {
    const sent = edit(typing(wide, choiceItem()), { kind: 'send' });
    const wider = measureItem({ aim: { text: '1.760', unit: 'in' } });
    const typedOn = edit(sent, { kind: 'say', item: wider });
    const state = edit(typedOn, { kind: 'saved elsewhere or here', saved: later(wide, choiceItem()) });
    expect(state.document).toEqual(smallSpec(wider, choiceItem()));
    expect(state.meanwhile).toBeNull();
    expect(state.saved.revision).toBe(4);
    expect(state.clean).not.toBe(state.document);
  });

  test('that takes out what they took out, and brings back what they kept, when theirs is taken', () => {
    const without = edit(typing(wide, choiceItem()), { kind: 'saved elsewhere or here', saved: later(choiceItem()) });
    expect(edit(without, { kind: 'take theirs', key: 'nut_width' }).document).toEqual(smallSpec(choiceItem()));
    const gone = edit(typing(choiceItem()), { kind: 'saved elsewhere or here', saved: later(wide, choiceItem()) });
    expect(edit(gone, { kind: 'take theirs', key: 'nut_width' }).document).toEqual(smallSpec(choiceItem(), wide));
  });
});

test('a page knows what is saved: after its own saving, and not after a key stroke', () => {
  const fresh = startOf(saved);
  expect(fresh.clean).toBe(fresh.document);
  const typed = edit(fresh, { kind: 'say', item: satin });
  expect(typed.clean).not.toBe(typed.document);
  const sent = edit(typed, { kind: 'send' });
  const state = edit(sent, { kind: 'saved elsewhere or here', saved: later(measureItem(), satin) });
  expect(state.clean).toBe(state.document);
});

describe('items', () => {
  test('come behind the one they belong to, or last', () => {
    const behind = edit(startOf(saved), { kind: 'add', items: [measureItem({ key: 'a' })], behindKey: 'nut_width' });
    expect(behind.document.items.map(({ key }) => key)).toEqual(['nut_width', 'a', 'gloss']);
    const last = edit(startOf(saved), { kind: 'add', items: [measureItem({ key: 'a' })] });
    expect(last.document.items.map(({ key }) => key)).toEqual(['nut_width', 'gloss', 'a']);
  });

  test('that are not said otherwise stay the very same, so that their rows need no drawing', () => {
    const state = edit(startOf(saved), { kind: 'say', item: satin });
    expect(state.document.items[0]).toBe(saved.document.items[0]);
    expect(edit(state, { kind: 'take out', keys: ['gloss'] }).document.items).toEqual([measureItem()]);
  });
});
