import { expect, test } from 'vitest';
import { drawingOf, drawingWords, nameDrawings } from '@/lib/specs/drawings';
import { choiceItem, lookItem } from '../../support/spec';

const MORNING_MS = Date.UTC(2026, 11, 1, 9, 5);
const sentUp = (id: string, title: string, createdAt = MORNING_MS) => ({ id, title, photoId: null, createdAt });

test('drawings are called by their titles, and where two share one by when they came in the reader’s zone', () => {
  const drawings = nameDrawings(
    [sentUp('a', 'Inlay'), sentUp('b', 'Logo'), sentUp('c', 'Inlay', MORNING_MS + 3_600_000)],
    'Europe/Berlin',
  );
  expect(drawings.map(({ name }) => name)).toEqual(['Inlay (1 Dec, 10:05)', 'Logo', 'Inlay (1 Dec, 11:05)']);
});

test('only a look has a drawing, and one its reader may not open is no link', () => {
  const drawings = nameDrawings([sentUp('a', 'Inlay')], 'UTC');
  expect(drawingOf(lookItem({ documentId: 'a' }), drawings)?.name).toBe('Inlay');
  expect(drawingOf(lookItem({ documentId: 'b' }), drawings)).toBeNull();
  expect(drawingWords(lookItem({ documentId: 'b' }), drawings)).toBe('a drawing that was not put before you');
  expect([drawingWords(lookItem(), drawings), drawingWords(choiceItem(), drawings)]).toEqual([null, null]);
});
