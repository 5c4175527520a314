import { NoteRefusal } from './refusal';

/**
 * The own fields of an object that came from outside, without its prototype.
 * @throws NoteRefusal when the value is no object or has a field that is not in `known`
 */
export function readFields(value: unknown, known: readonly string[]): Map<string, unknown> {
  if (typeof value !== 'object' || value === null || Array.isArray(value)) throw new NoteRefusal('broken');
  const names = Object.keys(value);
  if (names.length > known.length || names.some((name) => !known.includes(name))) throw new NoteRefusal('foreign');
  return new Map(Object.entries(value));
}

/**
 * A list field; a missing one is an empty list.
 * @throws NoteRefusal when it is there and no array
 */
export function readList(value: unknown): readonly unknown[] {
  if (value === undefined) return [];
  if (!Array.isArray(value)) throw new NoteRefusal('broken');
  return value;
}
