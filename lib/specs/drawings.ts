import type { SpecItem } from './document';
import { clockWords, shortDay } from '@/lib/date-words';

/** A drawing or a sample that was sent up for a build; a sample may be a photo. */
export type SentUp = { id: string; title: string; photoId: string | null; createdAt: number };

/** The same under a name that no other of its build has. */
export type Drawing = { id: string; name: string; photoId: string | null };

/** Names a build's drawings: by their titles, and where two share one also by when they came, in the reader's zone. */
export function nameDrawings(sentUp: readonly SentUp[], zone: string): Drawing[] {
  return sentUp.map(({ id, title, photoId, createdAt }) => {
    const isAlone = sentUp.every((other) => other.id === id || other.title !== title);
    const name = isAlone ? title : `${title} (${shortDay(createdAt, zone)}, ${clockWords(createdAt, zone)})`;
    return { id, name, photoId };
  });
}

/** The drawing an item points to, among those its reader may open; null for none. */
export function drawingOf(item: SpecItem, drawings: readonly Drawing[]): Drawing | null {
  if (item.kind !== 'look' || item.documentId === null) return null;
  return drawings.find(({ id }) => id === item.documentId) ?? null;
}

/** What the drawing of an item is called to this reader; null where the item points to none. */
export function drawingWords(item: SpecItem, drawings: readonly Drawing[]): string | null {
  if (item.kind !== 'look' || item.documentId === null) return null;
  return drawingOf(item, drawings)?.name ?? 'a drawing that was not put before you';
}
