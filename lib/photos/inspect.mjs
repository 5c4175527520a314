import { readJpegHeader, readPngHeader, readWebpHeader } from './headers.mjs';

/** @typedef {import('./limits').DecoderLimits} DecoderLimits */
/** @typedef {import('./refusals').PhotoRefusalCode} PhotoRefusalCode */
/** @typedef {{ ok: false, code: PhotoRefusalCode, detail: string }} Refusal */

const PNG_SIGNATURE = Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]);

const READERS = new Map([
  ['image/jpeg', readJpegHeader],
  ['image/png', readPngHeader],
  ['image/webp', readWebpHeader],
]);

/** First bytes of pictures that are real but not taken: GIF, both TIFFs, HEIF and AVIF boxes, JPEG XL, Photoshop, BMP. */
const OTHER_PICTURES = [
  /^GIF8/,
  /^II\*\0/,
  /^MM\0\*/,
  /^[^]{4}ftyp/,
  /^[^]{4}(JXL|jP {2})/,
  /^\xff\x0a/,
  /^8BPS/,
  /^BM[^]{4}\0{4}/,
];

/**
 * What the file is by its own first bytes; the name and the promised type are never asked.
 * @param {Buffer} bytes
 * @returns {string} a media type, `other-picture`, or `unknown`
 */
export function sniffPicture(bytes) {
  if (bytes.length >= 3 && bytes.readUIntBE(0, 3) === 0xffd8ff) return 'image/jpeg';
  if (bytes.subarray(0, 8).equals(PNG_SIGNATURE)) return 'image/png';
  const start = bytes.toString('latin1', 0, 16);
  if (/^RIFF[^]{4}WEBP/.test(start)) return 'image/webp';
  return OTHER_PICTURES.some((signature) => signature.test(start)) ? 'other-picture' : 'unknown';
}

/**
 * @param {PhotoRefusalCode} code
 * @param {string} detail
 * @returns {Refusal}
 */
const refuse = (code, detail) => ({ ok: false, code, detail });

/**
 * @param {import('./headers.mjs').PictureHeader} header
 * @param {DecoderLimits} limits
 * @returns {Refusal | null}
 */
function judgeHeader({ widthPx, heightPx, scans, endAt }, limits) {
  const size = `${widthPx} x ${heightPx}`;
  if (Math.max(widthPx, heightPx) > limits.maxSidePx) return refuse('too_many_pixels', size);
  if (widthPx * heightPx > limits.maxPixels) return refuse('too_many_pixels', size);
  if (scans > limits.maxScans) return refuse('too_slow', `${scans} scans`);
  if (endAt === -1) return refuse('truncated', 'the end of the picture is missing');
  return widthPx * heightPx === 0 ? refuse('failed', `declares ${size} pixels`) : null;
}

/**
 * Judges a posted file before any decoder sees it. Answers the bytes a decoder may have: whatever trails the picture, a
 * second file glued to it included, is cut off. Of an animated WebP or PNG only the first picture is ever used.
 * @param {Buffer} bytes
 * @param {string} contentType the type promised for it
 * @param {DecoderLimits} limits
 * @returns {{ ok: true, picture: Buffer } | Refusal}
 */
export function inspectPhoto(bytes, contentType, limits) {
  const found = sniffPicture(bytes);
  if (found === 'unknown') return refuse('not_a_photo', 'no known signature');
  const read = READERS.get(found);
  if (!read || found !== contentType) return refuse('wrong_type', `promised ${contentType}, found ${found}`);
  const header = read(bytes);
  return judgeHeader(header, limits) ?? { ok: true, picture: bytes.subarray(0, header.endAt) };
}
