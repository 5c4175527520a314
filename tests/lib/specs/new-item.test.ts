import { describe, expect, test } from 'vitest';
import { chosenSides } from '@/lib/specs/compare';
import { blankItem, itemKinds, keyFor, secondScale } from '@/lib/specs/new-item';
import { usualSet } from '@/lib/specs/tunings';
import { checkDocument } from '@/lib/specs/check';
import { specDocument } from '@/lib/validation/specs';
import { choiceItem, measureItem } from '../../support/spec';

describe('a new item', () => {
  test('gets a key from its name that no other item has', () => {
    expect(keyFor('Größe der Mulde, links', new Set())).toBe('gro_e_der_mulde_links');
    expect(keyFor('Nut width', new Set(['nut_width', 'nut_width_2']))).toBe('nut_width_3');
    expect(keyFor('指板', new Set())).toBe('item');
  });

  test.each(itemKinds)('of the kind %s is a document the door takes', (kind) => {
    const items = [blankItem(kind, keyFor('New', new Set()), 'body', 'New')];
    expect(specDocument.safeParse({ items }).success).toBe(true);
  });
});

test('a second scale is frozen and proven where the first is, and meets it on the board', () => {
  const scale = measureItem({ key: 'scale_length', aim: { text: '25.5', unit: 'in' }, frozenFrom: 'neck' });
  const frets = measureItem({ key: 'fret_count', aim: { text: '24', unit: 'count' }, tolerance: null });
  const items = [scale, ...secondScale(scale), frets];
  expect(items.map(({ frozenFrom }) => frozenFrom)).toEqual(['neck', 'neck', 'neck', 'neck']);
  expect(
    checkDocument({ items }, { stageKeys: new Set(['neck']), materialKeys: new Set(), drawingIds: new Set() }),
  ).toEqual({});
});

test.each([4, 5, 6, 7, 8])('the usual set for %i strings fits them', (strings) => {
  const usual = usualSet(strings);
  const items = [
    measureItem({ key: 'string_count', aim: { text: `${strings}`, unit: 'count' }, tolerance: null }),
    choiceItem({ key: 'tuning', value: usual?.tuning ?? '', options: [] }),
    choiceItem({ key: 'gauges', value: usual?.gauges ?? '', options: [] }),
  ];
  const around = {
    stageKeys: new Set(['neck', 'finish']),
    materialKeys: new Set<string>(),
    drawingIds: new Set<string>(),
  };
  expect(checkDocument({ items }, around)).toEqual({});
});

describe('the two sides that are compared', () => {
  test('are those asked for, as far as they are there', () => {
    expect(chosenSides({ from: '1', to: '3' }, [3, 2, 1], false)).toEqual({ from: 1, to: 3 });
    expect(chosenSides({ from: '2', to: 'draft' }, [3, 2, 1], true)).toEqual({ from: 2, to: 'draft' });
    expect(chosenSides({ from: '9', to: 'draft' }, [3, 2, 1], false)).toEqual({ from: 2, to: 3 });
    expect(chosenSides({ from: ['1', '2'], to: '0x1' }, [3, 2, 1], false)).toEqual({ from: 2, to: 3 });
  });

  test('are the last two there are, the draft last; none where there are no two', () => {
    expect(chosenSides({}, [1], true)).toEqual({ from: 1, to: 'draft' });
    expect(chosenSides({ to: 'draft' }, [2, 1], true)).toEqual({ from: 2, to: 'draft' });
    expect(chosenSides({}, [1], false)).toBeNull();
    expect(chosenSides({}, [], true)).toBeNull();
  });
});
