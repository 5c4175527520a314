import { isRecord } from '../record';
import { readAddress, readAddresses } from './address';
import { readAttachments, type Attachment } from './attachment';
import { Refusal } from './refusal';

/** A mail as the sender's request has it, checked. */
export interface Draft {
  from: string;
  to: string[];
  cc: string[];
  bcc: string[];
  replyTo: string[];
  subject: string;
  html: string | null;
  text: string | null;
  headers: Record<string, string>;
  tags: { name: string; value: string }[];
  attachments: Attachment[];
}

const HEADER_NAME = /^[!#$%&'*+.^_`|~0-9A-Za-z-]+$/;
const LINE_BREAK = /[\r\n]/;

function readSubject(value: unknown): string {
  if (value === undefined) throw new Refusal('missing_required_field', 'The `subject` is missing.');
  if (typeof value !== 'string') throw new Refusal('validation_error', 'The `subject` must be text.');
  if (LINE_BREAK.test(value)) throw new Refusal('validation_error', 'The `subject` must not hold a line break.');
  return value;
}

function readBody(value: unknown, name: string): string | null {
  if (value === undefined || value === null) return null;
  if (typeof value !== 'string') throw new Refusal('validation_error', `The \`${name}\` must be text.`);
  return value;
}

function readHeaders(value: unknown): Record<string, string> {
  if (value === undefined || value === null) return {};
  if (!isRecord(value)) throw new Refusal('validation_error', 'The `headers` must be an object.');
  const headers: Record<string, string> = {};
  for (const [name, text] of Object.entries(value)) {
    const isGood = HEADER_NAME.test(name) && typeof text === 'string' && !LINE_BREAK.test(text);
    if (!isGood) throw new Refusal('validation_error', 'A header needs a plain name and text without line breaks.');
    headers[name] = text;
  }
  return headers;
}

function readTags(value: unknown): Draft['tags'] {
  if (value === undefined || value === null) return [];
  if (!Array.isArray(value)) throw new Refusal('validation_error', 'The `tags` must be a list.');
  return value.map((tag: unknown) => {
    const { name, value: text } = isRecord(tag) ? tag : {};
    const isGood = (part: unknown): part is string => typeof part === 'string' && /^[A-Za-z0-9_-]{1,256}$/.test(part);
    if (!isGood(name) || !isGood(text)) {
      throw new Refusal('validation_error', 'A tag has a name and a value of letters, digits, _ and -.');
    }
    return { name, value: text };
  });
}

/**
 * Checks one mail of a request.
 * @throws Refusal naming the first field that is missing or wrong
 */
export function readDraft(value: unknown): Draft {
  if (!isRecord(value)) throw new Refusal('validation_error', 'A mail must be an object.');
  for (const name of ['template', 'scheduled_at']) {
    if (value[name] !== undefined) throw new Refusal('validation_error', `The local mail room has no \`${name}\`.`);
  }
  const draft = {
    from: readAddress(value.from, 'from'),
    to: readAddresses(value.to, 'to'),
    cc: value.cc === undefined ? [] : readAddresses(value.cc, 'cc'),
    bcc: value.bcc === undefined ? [] : readAddresses(value.bcc, 'bcc'),
    replyTo: value.reply_to === undefined ? [] : readAddresses(value.reply_to, 'reply_to'),
    subject: readSubject(value.subject),
    html: readBody(value.html, 'html'),
    text: readBody(value.text, 'text'),
    headers: readHeaders(value.headers),
    tags: readTags(value.tags),
    attachments: readAttachments(value.attachments),
  };
  if (!draft.html && !draft.text) throw new Refusal('missing_required_field', 'Give `html`, `text` or both.');
  return draft;
}
