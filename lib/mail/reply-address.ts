import { createHmac, hkdfSync, timingSafeEqual } from 'node:crypto';
import { env } from '@/lib/env';

/** Base32 of RFC 4648 in small letters: what stands before an @ may lose its capitals on the way. */
const ALPHABET = 'abcdefghijklmnopqrstuvwxyz234567';
const VERSION = 'a';
const ID_BYTES = 16;
const MAC_BYTES = 16;
const ID_CHARS = 26;
const TOKEN = /^a([a-z2-7]{26})([a-z2-7]{26})$/;

function toBase32(bytes: Uint8Array): string {
  let bits = '';
  for (const byte of bytes) bits += byte.toString(2).padStart(8, '0');
  const groups = bits.match(/.{1,5}/g) ?? [];
  return groups.map((group) => ALPHABET.charAt(parseInt(group.padEnd(5, '0'), 2))).join('');
}

function fromBase32(text: string): Buffer {
  const bits = [...text].map((char) => ALPHABET.indexOf(char).toString(2).padStart(5, '0')).join('');
  const groups = bits.match(/.{8}/g) ?? [];
  return Buffer.from(groups.map((group) => parseInt(group, 2)));
}

let known: { secret: string; key: Buffer } | undefined;

/** A key of its own, so that no other keyed hash of this program can stand in for one of these. */
function replyKey(): Buffer {
  const secret = env().AUTH_SECRET;
  if (known?.secret !== secret)
    known = { secret, key: Buffer.from(hkdfSync('sha256', secret, '', 'flitchbook reply address 1', 32)) };
  return known.key;
}

function macOf(questionId: Buffer, userId: string): Buffer {
  const mac = createHmac('sha256', replyKey()).update(VERSION).update(questionId).update(userId).digest();
  return mac.subarray(0, MAC_BYTES);
}

/**
 * Where one person's answers about one question go: `reply+<token>@<domain>`. The token holds the question's id and 128
 * bits that only this program can make for these two, in 53 letters, within the 64 that RFC 5321, 4.5.3.1.1, allows.
 * Undefined where the shop takes no mail, or for an id that is not one of ours.
 */
export function replyAddress(questionId: string, userId: string): string | undefined {
  const domain = env().MAIL_REPLY_DOMAIN;
  const id = Buffer.from(questionId, 'base64url');
  if (domain === undefined || id.length !== ID_BYTES || id.toString('base64url') !== questionId) return undefined;
  return `reply+${VERSION}${toBase32(id)}${toBase32(macOf(id, userId))}@${domain}`;
}

export type ReplyToken = { questionId: string; isFor: (userId: string) => boolean };

/** The question that an address of ours names, and whether it was made for somebody; null for any other address. */
export function readReplyAddress(address: string): ReplyToken | null {
  const [local = '', domain = ''] = address.toLowerCase().split('@');
  if (domain !== env().MAIL_REPLY_DOMAIN?.toLowerCase() || !local.startsWith('reply+')) return null;
  const parts = TOKEN.exec(local.slice('reply+'.length));
  if (!parts) return null;
  const [, id = '', mac = ''] = parts;
  if (id.length !== ID_CHARS) return null;
  const questionId = fromBase32(id);
  const given = fromBase32(mac);
  return {
    questionId: questionId.toString('base64url'),
    isFor: (userId) => timingSafeEqual(macOf(questionId, userId), given),
  };
}
