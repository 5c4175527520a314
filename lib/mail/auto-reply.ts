import { bareAddress } from '@/lib/mail/bare-address';
import { isOwnMessageId } from '@/lib/mail/question-headers';

export type MailFields = Record<string, string>;

const MACHINES = /^(?:mailer-daemon|postmaster|no-?reply|do-?not-?reply|bounces?)(?:[+=.-].*)?@/i;

/**
 * Why a mail that came in was written by no person, in a few words, or null. RFC 3834, 5: Auto-Submitted other than "no";
 * beside it what list servers and mail programs set (RFC 2919, RFC 2369, Precedence, X-Auto-Response-Suppress), the null
 * return path of RFC 5321, 4.5.5, and our own mails that come back to us.
 * @param fields header fields by name in small letters
 * @param ownFrom the address that our mails come from
 */
export function whyAutomatic(fields: MailFields, from: string, ownFrom: string): string | null {
  const value = (name: string) => fields[name]?.trim().toLowerCase() ?? '';
  const submitted = value('auto-submitted').split(/[;\s]/)[0] ?? '';
  if (submitted !== '' && submitted !== 'no') return 'it says that a machine sent it';
  if (/^(?:bulk|junk|list|auto[_-]?reply)$/.test(value('precedence'))) return 'it went out in bulk';
  if (Object.keys(fields).some((name) => name.startsWith('list-'))) return 'it came through a list';
  if (value('x-auto-response-suppress') !== '' || value('x-autoreply') !== '' || value('x-autorespond') !== '')
    return 'it is an automatic answer';
  if (value('return-path') === '<>') return 'it has no sender to answer to';
  if (value('content-type').startsWith('multipart/report')) return 'it is a delivery report';
  const sender = bareAddress(from);
  if (sender === null || MACHINES.test(sender)) return 'a machine sent it';
  if (sender === bareAddress(ownFrom) || isOwnMessageId(fields['message-id'] ?? '', ownFrom))
    return 'it is a mail of our own that came back';
  return null;
}

/** Whether the receiving server found that the mail does not come from where it says (RFC 8601). */
export const isDisowned = (fields: MailFields) => /\bdmarc=fail\b/i.test(fields['authentication-results'] ?? '');
