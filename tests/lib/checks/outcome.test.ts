import { expect, test } from 'vitest';
import { endOf, lacksPhoto, problemsOf, type LineToMark } from '@/lib/checks/outcome';

const line = (over: Partial<LineToMark> = {}): LineToMark => ({
  text: 'Edges even.',
  photoNeeded: false,
  mark: 'pass',
  photoId: null,
  ...over,
});
const nowhere = { backToStageId: null, reason: '' };

test('one fail fails the list; what does not apply counts for nothing', () => {
  expect(endOf([line(), line({ mark: 'not_applicable' })])).toBe('passed');
  expect(endOf([line(), line({ mark: 'fail' })])).toBe('failed');
});

test.each([
  { mark: 'pass', lacks: true },
  { mark: 'fail', lacks: true },
  { mark: 'not_applicable', lacks: false },
  { mark: null, lacks: false },
] as const)('a line that asks for a photo and is marked $mark lacks one: $lacks', ({ mark, lacks }) => {
  expect(lacksPhoto(line({ photoNeeded: true, mark }))).toBe(lacks);
  expect(lacksPhoto(line({ photoNeeded: true, mark, photoId: 'a' }))).toBe(false);
});

test('a list cannot end with a line unmarked, without its photo, or without lines', () => {
  expect(problemsOf([line(), line({ mark: null, text: 'No dust.' })], nowhere)?.lines).toContain('No dust.');
  expect(problemsOf([line({ photoNeeded: true })], nowhere)?.lines).toContain('photo');
  expect(problemsOf([], nowhere)?.lines).toBeTruthy();
  expect(problemsOf([line()], nowhere)).toBeNull();
});

test('a fail asks where the build goes back to, and why', () => {
  const failed = [line({ mark: 'fail' })];
  expect(Object.keys(problemsOf(failed, nowhere) ?? {})).toEqual(['backToStageId', 'reason']);
  expect(Object.keys(problemsOf(failed, { backToStageId: 'body', reason: '' }) ?? {})).toEqual(['reason']);
  expect(problemsOf(failed, { backToStageId: 'body', reason: 'A dent.' })).toBeNull();
});
