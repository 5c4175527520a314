import { z } from 'zod';

const PATTERN =
  /^[a-z0-9!#$%&'*+/=?^_`{|}~-]+(\.[a-z0-9!#$%&'*+/=?^_`{|}~-]+)*@[a-z0-9]([a-z0-9-]*[a-z0-9])?(\.[a-z0-9]([a-z0-9-]*[a-z0-9])?)+$/;

/** A mail address as it is stored: NFKC, plain ASCII, lower case, at most 254 characters; null when it is none. */
export function normaliseAddress(input: unknown): string | null {
  if (typeof input !== 'string' || input.length > 254) return null;
  const address = input.normalize('NFKC').trim().toLowerCase();
  return PATTERN.test(address) ? address : null;
}

export const addressField = z.string().transform((value, context) => {
  const address = normaliseAddress(value);
  if (address) return address;
  context.addIssue({
    code: 'custom',
    message: 'That does not look like a mail address. Write it as name@example.com.',
  });
  return z.NEVER;
});
