import { isRecord } from '../record';
import { Refusal } from './refusal';

export interface Attachment {
  filename: string;
  contentType: string;
  contentId: string | null;
  contentBase64: string;
}

const BASE64 = /^(?:[A-Za-z0-9+/]{4})*(?:[A-Za-z0-9+/]{2}==|[A-Za-z0-9+/]{3}=)?$/;
const PRINTABLE = /^[^\u0000-\u001f\u007f]{1,255}$/;
const MEDIA_TYPE = /^[\w.+-]+\/[\w.+-]+(?:; ?[\w.+-]+=[\w.+" -]+)*$/;

function isText(value: unknown, pattern: RegExp): value is string {
  return typeof value === 'string' && pattern.test(value);
}

function readAttachment(value: unknown): Attachment {
  const fail = (message: string) => new Refusal('invalid_attachment', message);
  if (!isRecord(value)) throw fail('An attachment must be an object.');
  const { filename, content, content_type = 'application/octet-stream', content_id = null } = value;
  if (value.path !== undefined) throw fail('The local mail room fetches nothing: give an attachment its `content`.');
  if (!isText(filename, PRINTABLE)) throw fail('An attachment needs a `filename`.');
  if (!isText(content, BASE64) || content === '') throw fail('The `content` of an attachment must be base64.');
  if (!isText(content_type, MEDIA_TYPE)) throw fail('The `content_type` of an attachment must be like image/jpeg.');
  if (content_id !== null && !isText(content_id, PRINTABLE)) throw fail('The `content_id` must be text.');
  return { filename, contentType: content_type, contentId: content_id, contentBase64: content };
}

/** @throws Refusal naming what is wrong with the first attachment that is not good */
export function readAttachments(value: unknown): Attachment[] {
  if (value === undefined || value === null) return [];
  if (!Array.isArray(value)) throw new Refusal('invalid_attachment', 'The `attachments` must be a list.');
  return value.map(readAttachment);
}

export function attachmentSize_bytes({ contentBase64 }: Attachment): number {
  return Buffer.byteLength(contentBase64, 'base64');
}
