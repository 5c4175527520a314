import { expect, test } from 'vitest';
import { boardOf, computedFrom, stringPlanOf, tensionBandOf } from '@/lib/specs/board';
import { fitTemplate } from '@/lib/specs/fit-template';
import { starterTemplates } from '@/lib/specs/templates';
import { choiceItem, measureItem } from '../../support/spec';

const template = (name: string) => {
  const found = starterTemplates.find((one) => one.name.startsWith(name));
  if (!found) throw new Error(`no template ${name}`);
  return found.document;
};

test('a spec of two scales makes a board of two scales, in millimetres', () => {
  expect(boardOf(template('Seven'))).toMatchObject({
    ok: true,
    value: {
      trebleScaleMm: 647.7,
      bassScaleMm: 685.8,
      perpendicularFret: 8,
      fretCount: 24,
      stringCount: 7,
      nutWidthMm: 48.006,
      inlay: 'dots',
    },
  });
});

test('without a scale there is no board, and a sentence why', () => {
  expect(boardOf({ items: [choiceItem()] })).toMatchObject({
    ok: false,
    message: expect.stringMatching(/scale length/),
  });
  const unread = measureItem({ key: 'scale_length', aim: { text: '25.5', unit: 'mm' }, tolerance: null });
  expect(boardOf({ items: [unread] }).ok).toBe(false);
});

test('strings come from tuning and gauges, with the band the player chose', () => {
  const plan = stringPlanOf(template('Baritone'));
  expect(plan.ok && plan.value.strings.map(({ gauge }) => gauge.gaugeThou)).toEqual([14, 19, 26, 38, 50, 62]);
  expect(tensionBandOf(template('Baritone'))).toEqual({ lowLb: 14, highLb: 21 });
  expect(stringPlanOf({ items: [] }).ok).toBe(false);
});

test('only what something is computed from asks for computing anew', () => {
  const document = template('Six');
  const said = (key: string, text: string) => ({
    items: document.items.map((item) =>
      item.key === key && item.kind === 'measure' ? { ...item, aim: { ...item.aim, text } } : item,
    ),
  });
  expect(computedFrom(said('body_thickness', '1.8'))).toBe(computedFrom(document));
  expect(computedFrom(said('scale_length', '25.6'))).not.toBe(computedFrom(document));
});

test('a template takes the scale of the order and drops stages that its route does not have', () => {
  const { items } = fitTemplate(template('Six'), { scaleLengthIn: 24.75, stageKeys: new Set(['machining']) });
  expect(items.find(({ key }) => key === 'scale_length')).toMatchObject({
    aim: { text: '24.75', unit: 'in' },
    frozenFrom: 'machining',
  });
  expect(items.find(({ key }) => key === 'body_wood')).toMatchObject({ frozenFrom: null, provenAt: null });
});
