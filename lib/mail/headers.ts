import { requireMailLink } from '@/lib/mail/mail-link';

export type MailHeaders = Record<string, string>;

// RFC 5322, 2.1.1: a line holds at most 998 characters without its CRLF.
const LONGEST_LINE = 998;
const FIELD_NAME = /^[!-9;-~]+$/;
const BREAKS_A_LINE = /[\p{Cc}\u2028\u2029]/u;

/** A value that would start a second header line, or that no mail system may carry. */
export class UnsafeHeader extends Error {
  override name = 'UnsafeHeader';
}

/**
 * Gives back a header's value, or a subject or address, when it stays on its one line.
 * @throws UnsafeHeader when the name is no field name of RFC 5322, or the value holds CR, LF or any control character, or
 *   the line is longer than 998 characters
 */
export function requireHeader(name: string, value: string): string {
  if (!FIELD_NAME.test(name)) throw new UnsafeHeader(`not a header name: ${JSON.stringify(name)}`);
  if (BREAKS_A_LINE.test(value)) throw new UnsafeHeader(`${name} holds a line break or control character`);
  if (name.length + 2 + value.length > LONGEST_LINE) throw new UnsafeHeader(`${name} is longer than one line may be`);
  return value;
}

/** Gives back a subject when it is one line. @throws UnsafeHeader as `requireHeader` does */
export function requireSubject(subject: string): string {
  return requireHeader('Subject', subject);
}

/**
 * The one-click pair of RFC 8058, 3.1, in the form of RFC 2369, 3.2. The address must answer a POST without cookies.
 * @throws UnsafeLink when `url` is not https (http on this machine aside), UnsafeHeader when it is too long for one line
 */
export function unsubscribeHeaders(url: string): MailHeaders {
  return {
    'List-Unsubscribe': requireHeader('List-Unsubscribe', `<${requireMailLink(url)}>`),
    'List-Unsubscribe-Post': 'List-Unsubscribe=One-Click',
  };
}

/** Marks mail no person wrote (RFC 3834, 5), so that out-of-office programs leave it unanswered. */
export function autoHeaders(): MailHeaders {
  return { 'Auto-Submitted': 'auto-generated', 'X-Auto-Response-Suppress': 'OOF, AutoReply' };
}

/** Names what the mail belongs to, for filters (RFC 2919, 3): a phrase and an id on the shop's own host. */
export function listHeaders(host: string): MailHeaders {
  return { 'List-Id': requireHeader('List-Id', `Build diary <diary.${host}>`) };
}
