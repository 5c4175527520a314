import { BadInput, Denied, OutOfReach } from '@/lib/errors';

export type Refusal = { status: number; message: string; fields?: Record<string, string>; retryAfterSeconds?: number };

const statuses: Record<Denied['code'], number> = {
  signed_out: 401,
  not_allowed: 403,
  bad_request: 400,
  too_many: 429,
  conflict: 409,
  too_large: 413,
  busy: 503,
};

/** What a failure looks like from outside, or null when it is a fault of ours that must not be dressed up. */
export function refusalOf(error: unknown): Refusal | null {
  if (error instanceof OutOfReach) return { status: 404, message: 'There is nothing here for you.' };
  if (error instanceof BadInput) {
    return { status: 422, message: 'Something needs another look before this can be saved.', fields: error.fields };
  }
  if (error instanceof Denied) {
    return { status: statuses[error.code], message: error.message, retryAfterSeconds: error.retryAfterSeconds };
  }
  return null;
}

/** One sentence a field, from a zod error. */
export function fieldSentences(issues: readonly { path: PropertyKey[]; message: string }[]): Record<string, string> {
  const fields: Record<string, string> = {};
  for (const { path, message } of issues) fields[path.map(String).join('.') || 'form'] ??= message;
  return fields;
}
