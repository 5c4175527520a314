/** True for a plain JSON object, whose fields may then be looked at one by one. */
export function isRecord(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}
