import { escapeMarkup } from '../markup';
import type { Answer } from './answer';
import type { Refusal } from './refusal';

const ENTITY = /&(?:(amp|lt|gt|quot|apos)|#(\d{1,7})|#x([0-9a-fA-F]{1,6}));/g;
const NAMED: Record<string, string> = { amp: '&', lt: '<', gt: '>', quot: '"', apos: "'" };

/** One element with text in it. */
export function element(name: string, text: string | number | boolean): string {
  return `<${name}>${escapeMarkup(String(text))}</${name}>`;
}

export function xmlAnswer(status: number, root: string, content: string): Answer {
  const body = `<?xml version="1.0" encoding="UTF-8"?>\n<${root}>${content}</${root}>`;
  return { status, headers: { 'content-type': 'application/xml' }, body };
}

export function refusalAnswer(refusal: Refusal, resource: string): Answer {
  const content = element('Code', refusal.code) + element('Message', refusal.message) + element('Resource', resource);
  return xmlAnswer(refusal.status, 'Error', content);
}

function unescape(text: string): string {
  return text.replace(
    ENTITY,
    (_whole, name: string | undefined, decimal: string | undefined, hex: string | undefined) => {
      if (name !== undefined) return NAMED[name] ?? '';
      const code = decimal === undefined ? Number.parseInt(hex ?? '', 16) : Number(decimal);
      return code <= 0x10ffff ? String.fromCodePoint(code) : '\ufffd';
    },
  );
}

/** The text of every element of one name, wherever it stands; enough for the flat lists S3 clients send. */
export function readElements(xml: string, name: string): string[] {
  const pattern = new RegExp(`<${name}>([^<]*)</${name}>`, 'g');
  return [...xml.matchAll(pattern)].map((match) => unescape(match[1] ?? ''));
}
