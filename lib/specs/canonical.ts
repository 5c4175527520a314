/** JSON with the keys of every object in order, so that equal content is equal text however it was put together. */
export function canonicalJson(value: unknown): string {
  return JSON.stringify(value, (_key, part: unknown) => (isRecord(part) ? sorted(part) : part));
}

/** Whether two pieces of content say the same. */
export const isSame = (one: unknown, other: unknown) => one === other || canonicalJson(one) === canonicalJson(other);

function isRecord(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

function sorted(record: Record<string, unknown>): Record<string, unknown> {
  return Object.fromEntries(Object.entries(record).sort(([one], [other]) => (one < other ? -1 : 1)));
}
