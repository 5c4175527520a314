import { Refusal } from './refusal';

const LIMIT = 50;
const ADDRESS = /^[A-Za-z0-9.!#$%&'*+/=?^_`{|}~-]{1,64}@(?:[A-Za-z0-9](?:[A-Za-z0-9-]*[A-Za-z0-9])?\.)+[A-Za-z]{2,}$/;

/** The bare address, in small letters, of `name@host` or `Name <name@host>`; undefined when it is neither. */
export function bareAddress(mailbox: string): string | undefined {
  const inner = /^[^<>\r\n]*<([^<>]+)>$/.exec(mailbox)?.[1] ?? mailbox;
  return ADDRESS.test(inner) ? inner.toLowerCase() : undefined;
}

/** @throws Refusal when the field is missing or is not one mailbox */
export function readAddress(value: unknown, field: string): string {
  if (value === undefined || value === null || value === '') {
    throw new Refusal('missing_required_field', `The \`${field}\` is missing.`);
  }
  if (typeof value !== 'string' || bareAddress(value) === undefined) {
    const reason = field === 'from' ? 'invalid_from_address' : 'validation_error';
    throw new Refusal(reason, `The \`${field}\` must be like name@shop.example or Name <name@shop.example>.`);
  }
  return value;
}

/** @throws Refusal unless the field holds 1 to 50 mailboxes, as text or as a list */
export function readAddresses(value: unknown, field: string): string[] {
  const list: unknown[] = Array.isArray(value) ? value : [value];
  if (list.length === 0) throw new Refusal('missing_required_field', `The \`${field}\` is empty.`);
  if (list.length > LIMIT) throw new Refusal('validation_error', `The \`${field}\` takes at most ${LIMIT} addresses.`);
  return list.map((item) => readAddress(item, field));
}
