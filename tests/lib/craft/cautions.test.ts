import { describe, expect, test } from 'vitest';
import { caution, cautions, cautionsForGroup, cautionsForMaterials, cautionsForWork } from '@/lib/craft/cautions';
import { starterMaterials } from '@/lib/craft/materials';
import { specGroups } from '@/lib/specs/document';
import { kindsOfWork } from '@/lib/work';

const keys = (found: { key: string }[]) => found.map(({ key }) => key);

describe('the cautions', () => {
  test('each have a key of their own and a place', () => {
    expect(new Set(keys([...cautions])).size).toBe(cautions.length);
    for (const { works, groups } of cautions) expect(works.length + groups.length).toBeGreaterThan(0);
  });

  test('each defer to somebody who decides', () => {
    const deciders = /data sheet|authorit|local|licensed|trained|doctor|maker|someone who knows/i;
    for (const { text } of cautions) expect(text).toMatch(deciders);
  });

  test('of finishing stand beside finish work and the finish group', () => {
    for (const found of [cautionsForWork('finish'), cautionsForGroup('finish')]) {
      expect(keys(found)).toEqual(expect.arrayContaining(['solvents', 'isocyanates', 'spray_room']));
    }
  });

  test('of strings and the truss rod stand on the set-up sheet', () => {
    expect(keys(cautionsForWork('setup'))).toEqual(expect.arrayContaining(['string_change', 'truss_rod', 'magnets']));
    expect(keys(cautionsForGroup('strings'))).toEqual(['string_change', 'truss_rod']);
  });

  test('of dust stand wherever wood is cut or sanded', () => {
    for (const work of ['wood', 'machining', 'neck', 'body', 'buffing'] as const) {
      expect(keys(cautionsForWork(work))).toContain('dust');
    }
  });

  test('of power and magnets stand beside electronics', () => {
    expect(keys(cautionsForGroup('electronics'))).toEqual(['mains', 'lithium', 'magnets']);
  });

  test('reach every kind of work and every group but hardware', () => {
    expect(kindsOfWork.filter((work) => cautionsForWork(work).length === 0)).toEqual([]);
    expect(specGroups.filter((group) => cautionsForGroup(group).length === 0)).toEqual(['hardware']);
  });

  test('about papers stand beside marked materials only', () => {
    const marked = starterMaterials.filter(({ papersMayBeNeeded }) => papersMayBeNeeded);
    expect(keys(cautionsForMaterials(marked.slice(0, 1)))).toEqual(['papers']);
    expect(cautionsForMaterials(starterMaterials.filter(({ papersMayBeNeeded }) => !papersMayBeNeeded))).toEqual([]);
    expect(caution('papers').text).toContain('asks its authority');
  });
});
