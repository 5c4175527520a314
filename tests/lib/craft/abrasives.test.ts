import { describe, expect, test } from 'vitest';
import {
  abrasives,
  doubtGrade,
  doubtSequence,
  doubtWetSanding,
  findAbrasive,
  splitGrades,
  suggestSequence,
} from '@/lib/craft/abrasives';
import { byProvenance, cell } from '../../support/provenance';
import { readReference } from '../../support/reference';

const grades = byProvenance(readReference('06_abrasive_grit'));
const equivalents = byProvenance(readReference('06b_grit_equivalents'));

// Source: FEPA P-grades (ISO 6344-2, 6344-3) as two public tables give them; US grades from public comparison charts.
describe('the P-grades', () => {
  test('are all of the table, coarse to fine', () => {
    expect(grades.own).toEqual([]);
    expect(abrasives.map(({ grade }) => grade)).toEqual(grades.outside.map(({ grade }) => grade));
    abrasives.slice(1).forEach((paper, index) => {
      expect(paper.medianGrainSizeUm).toBeLessThan(abrasives[index]?.medianGrainSizeUm ?? 0);
    });
  });

  test.each(grades.outside)('$grade has $median_grain_size_um µm', (row) => {
    expect(findAbrasive(row.grade ?? '')?.medianGrainSizeUm).toBe(cell(row, 'median_grain_size_um'));
  });

  test('name a US grade where a chart does, and nowhere else', () => {
    const known = abrasives.filter(({ nearestUsGrade }) => nearestUsGrade !== null);
    expect(known.map(({ grade, nearestUsGrade }) => [grade, nearestUsGrade])).toEqual(
      equivalents.outside.map((row) => [row.p_grade, cell(row, 'us_grade')]),
    );
  });
});

describe('a paper as typed', () => {
  test.each(['P320', 'p320', ' P 320 '])('%j is P320', (text) => expect(findAbrasive(text)?.grade).toBe('P320'));

  test('without its P is asked about, with what it may be', () => {
    expect(doubtGrade('1500')).toMatchObject({ kind: 'ask', sentence: expect.stringContaining('P1500 (12.6 µm)') });
    expect(doubtGrade('800')?.sentence).toContain('P1500 if it is on the US scale');
  });

  test.each(['P321', '7', 'fine', '', 'P'])('%j is refused with a sentence', (text) => {
    expect(doubtGrade(text)).toMatchObject({ kind: 'wrong', sentence: expect.stringMatching(/\.$/) });
  });

  test('several are taken apart in their order', () => {
    expect(splitGrades('P320, P400 p600; P 800')).toEqual(['P320', 'P400', 'p600', 'P800']);
  });
});

describe('papers one after another', () => {
  test('that grow finer in small steps need no word', () => {
    expect(doubtSequence(['P80', 'P120', 'P180', 'P220', 'P320'])).toEqual([]);
  });

  test.each([[['P180', 'P120']], [['P180', 'P180']]])('%j are refused, as they do not grow finer', (papers) => {
    expect(doubtSequence(papers)).toMatchObject([{ kind: 'wrong' }]);
  });

  test('that leave out two grades pass, three are asked about with what goes between', () => {
    expect(doubtSequence(['P220', 'P320'])).toEqual([]);
    const [doubt] = doubtSequence(['P180', 'P320']);
    expect(doubt).toMatchObject({ kind: 'ask', sentence: expect.stringContaining('P240') });
  });

  test('one that is unknown is said first', () => {
    expect(doubtSequence(['P180', '1500'])).toMatchObject([
      { kind: 'ask', sentence: expect.stringContaining('P1500') },
    ]);
  });

  test('none at all need no word', () => expect(doubtSequence([])).toEqual([]));

  test('for wet sanding run to P1500 before polishing', () => {
    expect(doubtWetSanding(['P800', 'P1000', 'P1200'])).toMatchObject([{ kind: 'ask' }]);
    expect(doubtWetSanding(['P800', 'P1000', 'P1200', 'P1500'])).toEqual([]);
    expect(doubtWetSanding(['P1500', 'P2000'])).toEqual([]);
  });
});

describe('a suggested sequence', () => {
  test('keeps both ends and has nothing to be asked about, for any two grades', () => {
    abrasives.forEach((from, first) =>
      abrasives.slice(first + 1).forEach((to) => {
        const papers = suggestSequence(from.grade, to.grade);
        expect([papers[0], papers.at(-1)]).toEqual([from.grade, to.grade]);
        expect(doubtSequence(papers)).toEqual([]);
      }),
    );
  });

  test('from P80 to P320 is the one in use', () => {
    expect(suggestSequence('P80', 'P320')).toEqual(['P80', 'P120', 'P180', 'P240', 'P320']);
  });

  test.each([
    ['P320', 'P80'],
    ['P320', 'P320'],
    ['P80', '1500'],
    ['coarse', 'P320'],
  ])('from %s to %s is refused', (from, to) => expect(() => suggestSequence(from, to)).toThrow(RangeError));
});
