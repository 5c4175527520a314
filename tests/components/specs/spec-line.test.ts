import { describe, expect, test } from 'vitest';
import { specCounts, specOver } from '@/components/specs/spec-head-words';
import { specLine, unproven } from '@/components/specs/spec-line';
import type { VersionRow } from '@/db/queries/spec-versions';
import type { SpecItem } from '@/lib/specs/document';
import { choiceItem, lookItem, measureItem } from '../../support/spec';

const NOW_MS = Date.UTC(2026, 11, 1);
const stage = { key: 'neck', name: 'Neck & frets', position: 1, usualDays: 9, startedAt: NOW_MS, finishedAt: null };

const around = {
  stages: [stage],
  openedKeys: new Set<string>(),
  zone: 'UTC',
  nowMs: NOW_MS,
  orderNumber: 'Q-2417',
  materials: { ebony: 'Ebony' },
  drawings: [{ id: 'd1', name: 'Headstock logo', photoId: null }],
  papersKeys: new Set(['ebony']),
  isDelivered: false,
};

const line = (item: SpecItem, over: Partial<Parameters<typeof specLine>[0]> = {}) =>
  specLine({ ...unproven(item), ...over }, around);

describe('one item of the spec page', () => {
  test('says what was signed and what was measured in each unit, exactly', () => {
    const scale = measureItem({ key: 'scale_length', aim: { text: '25.5', unit: 'in' } });
    expect(line(scale, { state: 'proven', measured: '25.5 in' })).toMatchObject({
      signed: { in: '25.5 in', fraction: '25 1/2 in', mm: '647.7 mm' },
      measured: { in: '25.5 in', fraction: '25 1/2 in', mm: '647.7 mm' },
    });
  });

  test('keeps an action in 64ths as a fraction, as it is read at the bench', () => {
    const action = measureItem({ key: 'action_bass', aim: { text: '6', unit: '64ths' } });
    const inEach = { in: '6/64 in', fraction: '6/64 in', mm: '2.381 mm' };
    expect(line(action, { measured: '6/64 in' })).toMatchObject({ signed: inEach, measured: inEach });
  });

  test('says a count without a unit', () => {
    const frets = measureItem({ key: 'fret_count', aim: { text: '22', unit: 'count' }, tolerance: null });
    expect(line(frets, { measured: '22' }).measured).toEqual({ in: '22', fraction: '22', mm: '22' });
  });

  test('leads to the entry that proves it, or names the stage that will', () => {
    const entry = { entryId: 'e1', authorName: '', photoId: null, isForOwner: true, stageName: 'Neck & frets' };
    const proven = line(measureItem(), { state: 'proven', proofs: [{ ...entry, datedAt: NOW_MS }] });
    expect(proven.proofs).toEqual([{ href: '/builds/Q-2417#entry-e1', words: '1 Dec, Neck & frets' }]);
    expect(line(measureItem()).expectedAt).toBe('at Neck & frets');
    expect(line(choiceItem({ provenAt: 'elsewhere' })).expectedAt).toBeNull();
  });

  test('leads to its drawing where this reader may open it', () => {
    expect(line(lookItem({ documentId: 'd1' })).drawing).toMatchObject({ id: 'd1', name: 'Headstock logo' });
    expect(line(lookItem({ documentId: 'd2' })).drawing).toBeNull();
    expect(line(lookItem()).drawing).toBeNull();
  });

  test('asks for papers only where the material it names is marked', () => {
    const wood = (materialKey: string | null): SpecItem => ({
      key: 'board',
      group: 'fingerboard',
      label: 'Board',
      frozenFrom: null,
      provenAt: null,
      kind: 'material',
      materialKey,
      words: 'ebony or alike',
    });
    expect(line(wood('ebony')).needsPapers).toBe(true);
    expect(line(wood(null)).needsPapers).toBe(false);
  });
});

describe('the head of the page', () => {
  const version: VersionRow = {
    id: 'v4',
    number: 4,
    sentAt: Date.UTC(2026, 4, 30),
    sentBy: 'Ruth Adeyemi',
    signOffId: 's',
    state: 'signed',
    answeredAt: Date.UTC(2026, 5, 2),
    signedName: 'Maren Oyelaran',
    answer: null,
  };

  test('says which version counts and when it was signed', () => {
    expect(specOver('Q-2417', [version], 4, 'UTC', NOW_MS)).toBe('Order Q-2417 · version 4, signed 2 June');
    const sent = { ...version, state: 'asked' as const, answeredAt: null };
    expect(specOver('Q-2417', [sent], 4, 'UTC', NOW_MS)).toBe('Order Q-2417 · version 4, sent 30 May, not signed yet');
  });

  test('counts what is proven, what is out, and what can still change', () => {
    const lines = [
      line(measureItem(), { state: 'proven' }),
      line(measureItem({ key: 'radius' }), { state: 'out_of_tolerance' }),
      line(choiceItem()),
    ];
    expect(specCounts(lines, true).map(({ value, label }) => `${value} ${label}`)).toEqual([
      '1 of 3 proven',
      '1 out of tolerance',
      '1 can still change',
    ]);
    expect(specCounts(lines, false)[0]).toEqual({ value: '3', label: 'items' });
  });
});
