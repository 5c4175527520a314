/**
 * Reads just enough of a picture's own structure to judge it before any decoder sees it. Every reader walks lengths only,
 * allocates nothing and takes time in proportion to the file.
 *
 * @typedef {object} PictureHeader
 * @property {number} widthPx 0 when the file declares none
 * @property {number} heightPx
 * @property {number} scans JPEG scans (SOS markers); 1 for the other formats
 * @property {number} endAt offset just past the picture's own last byte, or -1 when the file stops before it
 */

const JPEG_EOI = 0xd9;
const JPEG_SOS = 0xda;

/** @param {number} marker a JPEG marker that stands alone, without a length */
const standsAlone = (marker) => marker === 0x01 || (marker >= 0xd0 && marker <= 0xd8);

/** @param {number} marker a start-of-frame marker: C0 to CF but DHT, JPG and DAC */
const startsFrame = (marker) => marker >= 0xc0 && marker <= 0xcf && ![0xc4, 0xc8, 0xcc].includes(marker);

/**
 * Offset of the next marker's second byte at or after `from`, or -1. Stuffed zeros and restart markers inside a scan are
 * passed over.
 * @param {Buffer} bytes
 * @param {number} from
 * @param {boolean} insideScan
 */
function nextMarker(bytes, from, insideScan) {
  let at = bytes.indexOf(0xff, from);
  while (at !== -1 && at + 1 < bytes.length) {
    const marker = bytes.readUInt8(at + 1);
    const isData = marker === 0 || (insideScan && marker >= 0xd0 && marker <= 0xd7);
    if (marker !== 0xff && !isData) return at + 1;
    at = bytes.indexOf(0xff, at + (marker === 0xff ? 1 : 2));
  }
  return -1;
}

/**
 * JPEG (ITU-T T.81, annex B). Several frames are answered by the largest sides.
 * @param {Buffer} bytes
 * @returns {PictureHeader}
 */
export function readJpegHeader(bytes) {
  const header = { widthPx: 0, heightPx: 0, scans: 0, endAt: -1 };
  let at = nextMarker(bytes, 2, false);
  while (at !== -1) {
    const marker = bytes.readUInt8(at);
    if (marker === JPEG_EOI) return { ...header, endAt: at + 1 };
    if (standsAlone(marker)) {
      at = nextMarker(bytes, at + 1, false);
      continue;
    }
    if (at + 3 > bytes.length) break;
    if (startsFrame(marker) && at + 8 <= bytes.length) {
      header.heightPx = Math.max(header.heightPx, bytes.readUInt16BE(at + 4));
      header.widthPx = Math.max(header.widthPx, bytes.readUInt16BE(at + 6));
    }
    if (marker === JPEG_SOS) header.scans += 1;
    at = nextMarker(bytes, at + 1 + bytes.readUInt16BE(at + 1), marker === JPEG_SOS);
  }
  return header;
}

/**
 * PNG (W3C PNG, third edition). Later frames of an animated PNG are chunks of their own and never read.
 * @param {Buffer} bytes
 * @returns {PictureHeader}
 */
export function readPngHeader(bytes) {
  if (bytes.length < 24) return { widthPx: 0, heightPx: 0, scans: 1, endAt: -1 };
  const header = { widthPx: bytes.readUInt32BE(16), heightPx: bytes.readUInt32BE(20), scans: 1, endAt: -1 };
  let at = 8;
  while (at + 12 <= bytes.length) {
    const type = bytes.toString('latin1', at + 4, at + 8);
    at += 12 + bytes.readUInt32BE(at);
    if (type === 'IEND' && at <= bytes.length) return { ...header, endAt: at };
  }
  return header;
}

/**
 * WebP (RFC 9649): the canvas of an extended file, else the frame's own size.
 * @param {Buffer} bytes
 * @returns {PictureHeader}
 */
export function readWebpHeader(bytes) {
  const end = 8 + bytes.readUInt32LE(4);
  const header = { widthPx: 0, heightPx: 0, scans: 1, endAt: end <= bytes.length ? end : -1 };
  const first = bytes.toString('latin1', 12, 16);
  if (first === 'VP8X' && bytes.length >= 30) {
    return { ...header, widthPx: 1 + bytes.readUIntLE(24, 3), heightPx: 1 + bytes.readUIntLE(27, 3) };
  }
  if (first === 'VP8 ' && bytes.length >= 30) {
    return { ...header, widthPx: bytes.readUInt16LE(26) & 0x3fff, heightPx: bytes.readUInt16LE(28) & 0x3fff };
  }
  if (first === 'VP8L' && bytes.length >= 25) {
    const packed = bytes.readUInt32LE(21);
    return { ...header, widthPx: 1 + (packed & 0x3fff), heightPx: 1 + ((packed >>> 14) & 0x3fff) };
  }
  return header;
}
