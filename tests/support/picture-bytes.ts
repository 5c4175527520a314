import { crc32, deflateSync } from 'node:zlib';

/** A JPEG segment: marker, length, payload (ITU-T T.81, B.1.1.4). */
export function jpegSegment(marker: number, payload: Buffer): Buffer {
  const head = Buffer.from([0xff, marker, 0, 0]);
  head.writeUInt16BE(payload.length + 2, 2);
  return Buffer.concat([head, payload]);
}

/** The JPEG with more segments right after its first two bytes. */
export function withSegments(jpeg: Buffer, ...segments: Buffer[]): Buffer {
  return Buffer.concat([jpeg.subarray(0, 2), ...segments, jpeg.subarray(2)]);
}

/** An ICC profile as JPEG carries it (ICC.1, B.4), cut in pieces of at most 60 kB. */
export function iccSegments(profile: Buffer): Buffer[] {
  const size = 60_000;
  const count = Math.ceil(profile.length / size);
  return Array.from({ length: count }, (_, i) => {
    const head = Buffer.from([...Buffer.from('ICC_PROFILE\0', 'latin1'), i + 1, count]);
    return jpegSegment(0xe2, Buffer.concat([head, profile.subarray(i * size, (i + 1) * size)]));
  });
}

export function pngChunk(type: string, data: Buffer, crcXor = 0): Buffer {
  const body = Buffer.concat([Buffer.from(type, 'latin1'), data]);
  const out = Buffer.alloc(body.length + 8);
  out.writeUInt32BE(data.length, 0);
  body.copy(out, 4);
  out.writeUInt32BE((crc32(body) ^ crcXor) >>> 0, out.length - 4);
  return out;
}

/** The PNG with more chunks right after its header. */
export function withChunks(png: Buffer, ...chunks: Buffer[]): Buffer {
  return Buffer.concat([png.subarray(0, 33), ...chunks, png.subarray(33)]);
}

interface PngShape {
  widthPx: number;
  heightPx: number;
  bitDepth?: number;
  colourType?: number;
  interlaced?: boolean;
}

/** A PNG by hand: any declared size over any image data, already filtered and not yet compressed. */
export function handMadePng(shape: PngShape, imageData: Buffer): Buffer {
  const { widthPx, heightPx, bitDepth = 8, colourType = 2, interlaced = false } = shape;
  const header = Buffer.alloc(13);
  header.writeUInt32BE(widthPx, 0);
  header.writeUInt32BE(heightPx, 4);
  header.set([bitDepth, colourType, 0, 0, interlaced ? 1 : 0], 8);
  return Buffer.concat([
    Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]),
    pngChunk('IHDR', header),
    pngChunk('IDAT', deflateSync(imageData)),
    pngChunk('IEND', Buffer.alloc(0)),
  ]);
}

export function riffChunk(type: string, data: Buffer): Buffer {
  const head = Buffer.alloc(8);
  head.write(type, 0, 'latin1');
  head.writeUInt32LE(data.length, 4);
  return Buffer.concat([head, data, Buffer.alloc(data.length % 2)]);
}

export function webpFile(...chunks: Buffer[]): Buffer {
  return riffChunk('RIFF', Buffer.concat([Buffer.from('WEBP'), ...chunks]));
}

interface ExifBlock {
  orientation?: number;
  /** A JPEG to carry as the EXIF thumbnail. */
  thumbnail?: Buffer;
}

function shortEntry(tag: number, value: number): Buffer {
  const entry = Buffer.alloc(12);
  entry.writeUInt16BE(tag, 0);
  entry.writeUInt16BE(3, 2);
  entry.writeUInt32BE(1, 4);
  entry.writeUInt16BE(value, 8);
  return entry;
}

function longEntry(tag: number, value: number): Buffer {
  const entry = shortEntry(tag, 0);
  entry.writeUInt16BE(4, 2);
  entry.writeUInt32BE(value, 8);
  return entry;
}

function directory(entries: Buffer[], nextOffset: number): Buffer {
  const count = Buffer.alloc(2);
  count.writeUInt16BE(entries.length);
  const next = Buffer.alloc(4);
  next.writeUInt32BE(nextOffset);
  return Buffer.concat([count, ...entries, next]);
}

/** An EXIF segment by hand (CIPA DC-008), for values a library would refuse to write. */
export function exifSegment({ orientation = 1, thumbnail }: ExifBlock): Buffer {
  const first = directory([shortEntry(0x0112, orientation)], thumbnail ? 26 : 0);
  const second = thumbnail
    ? directory([shortEntry(0x0103, 6), longEntry(0x0201, 68), longEntry(0x0202, thumbnail.length)], 0)
    : Buffer.alloc(0);
  const tiff = Buffer.concat([Buffer.from('MM\0*\0\0\0\x08', 'latin1'), first, second, thumbnail ?? Buffer.alloc(0)]);
  return jpegSegment(0xe1, Buffer.concat([Buffer.from('Exif\0\0', 'latin1'), tiff]));
}
