import { describe, expect, test } from 'vitest';
import { canonicalJson } from '@/lib/specs/canonical';
import { contentHashOf } from '@/lib/specs/content-hash';
import { diffSpecs } from '@/lib/specs/diff';
import { mergeSpecs } from '@/lib/specs/merge';
import { toleranceFrom, toleranceText } from '@/lib/specs/tolerance';
import { choiceItem, lookItem, measureItem, smallSpec } from '../../support/spec';

const words = {
  show: 'in',
  materials: { ebony: 'Ebony' },
  stageNames: { neck: 'Neck & frets', finish: 'Finish' },
  drawings: [],
} as const;

describe('the difference between two versions', () => {
  test('names what was added, taken out and changed, and how it was said before', () => {
    const before = smallSpec(measureItem(), choiceItem(), choiceItem({ key: 'old', label: 'Old' }));
    const after = smallSpec(
      measureItem({ aim: { text: '1.750', unit: 'in' }, frozenFrom: 'finish' }),
      choiceItem(),
      choiceItem({ key: 'new', label: 'New' }),
    );
    const changes = diffSpecs(before, after, words);
    expect(changes.map(({ key, kind }) => `${kind} ${key}`)).toEqual(['changed nut_width', 'added new', 'removed old']);
    expect(changes[0]?.fields).toEqual([
      { name: 'value', before: '1.700 in', after: '1.750 in' },
      { name: 'frozen from', before: 'Neck & frets', after: 'Finish' },
    ]);
  });

  test('is empty between equal versions, whatever the order of their items', () => {
    expect(diffSpecs(smallSpec(), smallSpec(choiceItem(), measureItem()), words)).toEqual([]);
  });

  test('names the drawing that took the place of another', () => {
    const drawings = [{ id: 'd2', name: 'Inlay, drawing 2', photoId: null }];
    const [before, after] = [smallSpec(lookItem({ documentId: 'd1' })), smallSpec(lookItem({ documentId: 'd2' }))];
    expect(diffSpecs(before, after, { ...words, drawings })[0]?.fields).toEqual([
      { name: 'drawing', before: 'a drawing that was not put before you', after: 'Inlay, drawing 2' },
    ]);
    expect(diffSpecs(before, after, words)[0]?.fields.map(({ name }) => name)).toEqual(['drawing']);
    expect(diffSpecs(smallSpec(lookItem()), after, { ...words, drawings })[0]?.fields).toEqual([
      { name: 'drawing', before: null, after: 'Inlay, drawing 2' },
    ]);
  });

  test('is seen even where both read the same in the unit shown', () => {
    const [one, other] = ['1.7', '43.18'];
    const before = smallSpec(measureItem({ aim: { text: one, unit: 'in' } }));
    const after = smallSpec(measureItem({ aim: { text: other, unit: 'mm' } }));
    expect(diffSpecs(before, after, words)[0]?.fields[0]).toEqual({
      name: 'value',
      before: '1.7 in',
      after: '1.7 in (43.18 mm)',
    });
  });
});

describe('content', () => {
  test('has one hash however its keys are ordered, and another when anything in it changes', () => {
    const { aim, ...rest } = measureItem();
    expect(contentHashOf({ aim, ...rest })).toBe(contentHashOf(measureItem()));
    expect(contentHashOf(measureItem())).not.toBe(contentHashOf(measureItem({ aim: { text: '1.7', unit: 'in' } })));
    expect(canonicalJson({ b: [{ d: 1, c: 2 }], a: null })).toBe('{"a":null,"b":[{"c":2,"d":1}]}');
  });

  // By coreutils: printf '"abc"' | sha256sum
  test('is hashed by SHA-256 over its JSON', () => {
    expect(contentHashOf('abc')).toBe('6cc43f858fbb763301637b5af970e2a46b46f461f27e5a0f41e009c59b827b25');
  });
});

describe('two edits of one draft', () => {
  const base = smallSpec();
  const satin = choiceItem({ value: 'satin' });
  const wide = measureItem({ aim: { text: '1.750', unit: 'in' } });

  test('to different items go together', () => {
    const { merged, takenKeys, clashes } = mergeSpecs(
      base,
      smallSpec(wide, choiceItem()),
      smallSpec(measureItem(), satin),
    );
    expect(merged).toEqual(smallSpec(wide, satin));
    expect({ takenKeys, clashes }).toEqual({ takenKeys: ['gloss'], clashes: [] });
  });

  test('to the same item are told apart, and mine stands until somebody chooses', () => {
    const theirs = measureItem({ aim: { text: '1.650', unit: 'in' } });
    const { merged, clashes } = mergeSpecs(base, smallSpec(wide, choiceItem()), smallSpec(theirs, choiceItem()));
    expect(merged).toEqual(smallSpec(wide, choiceItem()));
    expect(clashes).toEqual([{ key: 'nut_width', mine: wide, theirs }]);
  });

  test('that say the same are no clash; what the other added or took out is taken over', () => {
    expect(mergeSpecs(base, smallSpec(wide, choiceItem()), smallSpec(wide, choiceItem())).clashes).toEqual([]);
    const added = choiceItem({ key: 'new' });
    expect(mergeSpecs(base, base, smallSpec(choiceItem(), added)).merged).toEqual(smallSpec(choiceItem(), added));
  });

  test('one taking out what the other changed is a clash', () => {
    const { clashes } = mergeSpecs(base, smallSpec(choiceItem()), smallSpec(wide, choiceItem()));
    expect(clashes).toEqual([{ key: 'nut_width', mine: null, theirs: wide }]);
  });
});

test.each(['0.005', '± 0.005', '1/64', '+0.010 -0.005', '+1/32 -1/64', '+0.01', '+ 0.01'])(
  'a tolerance comes back as it was typed: %s',
  (text) => {
    const tolerance = toleranceFrom(text);
    expect(tolerance && toleranceText(tolerance)).toBe(text);
  },
);

test('a tolerance of two sides is kept as two', () => {
  expect(toleranceFrom('+0.010 -0.005')).toEqual({ plus: '0.010', minus: '0.005' });
  expect(toleranceFrom('  ')).toBeNull();
});
