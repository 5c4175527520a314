import { describe, expect, test } from 'vitest';
import { draftForm, offerChangeForm } from '@/lib/validation/specs';
import { smallSpec } from '../../support/spec';

const offer = { requestId: 'a-request', price: '180', extraDays: '6', message: '', dueOn: '2026-12-20' };
const draft = { orderNumber: 'Q-2417', revision: '3', document: JSON.stringify(smallSpec()) };

describe('an offer', () => {
  test.each([
    ['180', 18_000],
    ['180.5', 18_050],
    ['180,55', 18_055],
    ['0', 0],
    ['0.29', 29],
  ])('of %s is kept in whole cents', (price, cents) => {
    expect(offerChangeForm.parse({ ...offer, price }).price).toBe(cents);
  });

  test.each(['', '-5', '1e3', 'NaN', 'about 180', '180.555', '1 80', '99999999'])(
    'with a price of "%s" gets a sentence at its price',
    (price) => {
      const issues = offerChangeForm.safeParse({ ...offer, price }).error?.issues ?? [];
      expect(issues.map(({ path }) => path)).toEqual([['price']]);
      expect(issues[0]?.message).toMatch(/[.]$/);
    },
  );

  test.each(['', '-1', '1.5', '366', 'six'])('with "%s" days gets a sentence at its days', (extraDays) => {
    const issues = offerChangeForm.safeParse({ ...offer, extraDays }).error?.issues ?? [];
    expect(issues.map(({ path }) => path)).toEqual([['extraDays']]);
  });
});

describe('a draft that comes in', () => {
  test('is the document that was sent', () => {
    expect(draftForm.parse(draft).document).toEqual(smallSpec());
  });

  test.each([
    ['no JSON', '{"items":'],
    ['another thing', '[]'],
    ['a field of its own making', JSON.stringify({ items: [{ ...smallSpec().items[0], isSigned: true }] })],
    ['an unknown unit', JSON.stringify(smallSpec()).replace('"unit":"in"', '"unit":"furlong"')],
    ['a key that is none', JSON.stringify(smallSpec()).replace('nut_width', '__proto__.x')],
    ['a number where text belongs', JSON.stringify(smallSpec()).replace('"1.700"', '1.7')],
  ])('with %s is refused', (_name, document) => {
    expect(draftForm.safeParse({ ...draft, document }).success).toBe(false);
  });

  test('keeps a measure as it was typed', () => {
    const document = JSON.stringify(smallSpec()).replace('1.700', '1 45/64');
    expect(draftForm.parse({ ...draft, document }).document.items[0]).toMatchObject({ aim: { text: '1 45/64' } });
  });
});
