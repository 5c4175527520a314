import { requireHeader, type MailHeaders } from '@/lib/mail/headers';
import { keyedHash } from '@/lib/auth/secrets';

/** The host of an address such as `Flitchbook <diary@quillhaven.example>`. */
export function hostOf(mailbox: string): string {
  return /@([A-Za-z0-9.-]+)>?\s*$/.exec(mailbox)?.[1]?.toLowerCase() ?? 'localhost';
}

/**
 * What makes all mail about one question one thread (RFC 5322, 3.6.4): each refers to the same first message, which need
 * not exist. The question's id is not in it.
 */
export function threadHeaders(questionId: string, from: string): MailHeaders {
  const first = `<question.${keyedHash('thread', questionId).slice(0, 22)}@${hostOf(from)}>`;
  return { 'In-Reply-To': requireHeader('In-Reply-To', first), References: requireHeader('References', first) };
}

/** A mail's own id (RFC 5322, 3.6.4), by which an answer from a machine that quotes it is known as one to us. */
export function messageId(mailId: string, from: string): string {
  return requireHeader('Message-ID', `<mail.${mailId}@${hostOf(from)}>`);
}

export const isOwnMessageId = (value: string, from: string): boolean =>
  /^<mail\.[\w-]+@([A-Za-z0-9.-]+)>$/.exec(value.trim())?.[1]?.toLowerCase() === hostOf(from);
