import { createHash } from 'node:crypto';
import { deflateSync } from 'node:zlib';
import sharp from 'sharp';
import type { PhotoRefusalCode } from '@/lib/photos/refusals';
import {
  exifSegment,
  handMadePng,
  iccSegments,
  jpegSegment,
  pngChunk,
  riffChunk,
  webpFile,
  withChunks,
  withSegments,
} from './picture-bytes';

export interface HostilePicture {
  name: string;
  bytes: Buffer;
  contentType: string;
  /** What must become of it: taken, or refused with this code. */
  outcome: 'taken' | PhotoRefusalCode;
  /** Where the promise made for it is not the truth. */
  promised?: { sizeBytes?: number; sha256Hex?: string };
}

type Row = readonly [name: string, bytes: Buffer | string, outcome: HostilePicture['outcome']];

const JPEG = 'image/jpeg';
const PNG = 'image/png';
const WEBP = 'image/webp';

function rowsAs(contentType: string, rows: readonly Row[]): HostilePicture[] {
  return rows.map(([name, bytes, outcome]) => ({ name, contentType, outcome, bytes: Buffer.from(bytes) }));
}

const ZIP = Buffer.from('PK\x03\x04\x14\0\0\0\0\0notes.txt', 'latin1');
const SCRIPT = '<script>fetch("https://canary.example/")</script>';
const noise = (width: number, height: number) =>
  sharp({
    create: { width, height, channels: 3, background: '#777', noise: { type: 'gaussian', mean: 128, sigma: 40 } },
  });
const flat = (width: number, height: number) =>
  sharp({ create: { width, height, channels: 3, background: '#8a5a2b' } });

async function notPhotos(): Promise<HostilePicture[]> {
  const box = (brand: string) => Buffer.from(`\0\0\0\x18ftyp${brand}\0\0\0\0mif1${brand}`, 'latin1');
  return rowsAs(JPEG, [
    ['nothing at all', '', 'not_a_photo'],
    ['one byte', '\xff', 'not_a_photo'],
    ['a script', '#!/bin/sh\nrm -rf "$HOME"\n', 'not_a_photo'],
    ['a page with a script', `<!doctype html>${SCRIPT}`, 'not_a_photo'],
    ['an SVG', `<svg xmlns="http://www.w3.org/2000/svg">${SCRIPT}</svg>`, 'not_a_photo'],
    [
      'an SVG that reads a file',
      '<svg xmlns="http://www.w3.org/2000/svg"><image href="file:///etc/passwd"/></svg>',
      'not_a_photo',
    ],
    ['a PDF', '%PDF-1.7\n1 0 obj<</OpenAction 2 0 R>>endobj', 'not_a_photo'],
    ['a zip', ZIP, 'not_a_photo'],
    ['a program', Buffer.from('\x7fELF\x02\x01\x01', 'latin1'), 'not_a_photo'],
    ['a text picture', 'P3 1 1 255 1 2 3', 'not_a_photo'],
    ['zeros', Buffer.alloc(4096), 'not_a_photo'],
    ['a GIF', await flat(8, 8).gif().toBuffer(), 'wrong_type'],
    ['a GIF that is a script too', Buffer.from('GIF89a=1;alert(1)//', 'latin1'), 'wrong_type'],
    ['a TIFF', await flat(8, 8).tiff().toBuffer(), 'wrong_type'],
    ['a big-endian TIFF header', Buffer.from('MM\0*\0\0\0\x08', 'latin1'), 'wrong_type'],
    ['a BMP', Buffer.from('BM\x46\0\0\0\0\0\0\0\x36\0\0\0', 'latin1'), 'wrong_type'],
    ['a HEIC', box('heic'), 'wrong_type'],
    ['an AVIF', await flat(8, 8).avif({ effort: 0 }).toBuffer(), 'wrong_type'],
    ['a JPEG XL', Buffer.from('\xff\x0a\0\0', 'latin1'), 'wrong_type'],
    ['a PNG', await flat(8, 8).png().toBuffer(), 'wrong_type'],
    ['a WebP', await flat(8, 8).webp().toBuffer(), 'wrong_type'],
  ]);
}

async function brokenPromises(): Promise<HostilePicture[]> {
  const bytes = await noise(200, 150).jpeg().toBuffer();
  const sha256Hex = createHash('sha256').update(bytes).digest('hex');
  const altered = Buffer.from(bytes);
  altered.writeUInt8(altered.readUInt8(900) ^ 1, 900);
  const good = { contentType: JPEG, outcome: 'altered' } as const;
  return [
    { ...good, name: 'one bit altered after the promise', bytes: altered, promised: { sha256Hex } },
    { ...good, name: 'a hash that is not one', bytes, promised: { sha256Hex: 'x' } },
    { ...good, name: 'an empty hash', bytes, promised: { sha256Hex: '' } },
    { ...good, name: 'shorter than promised', bytes, promised: { sizeBytes: bytes.length + 1 } },
    { ...good, name: 'longer than promised', bytes, promised: { sizeBytes: bytes.length - 1 } },
    { ...good, name: 'over 25 MB promised', bytes, outcome: 'too_large', promised: { sizeBytes: 26_214_401 } },
    {
      ...good,
      name: 'over 25 MB sent',
      bytes: Buffer.alloc(26_214_401),
      outcome: 'too_large',
      promised: { sizeBytes: 10 },
    },
    { ...good, name: 'a type nobody takes', bytes, contentType: 'image/svg+xml', outcome: 'wrong_type' },
    { ...good, name: 'a JPEG promised as PNG', bytes, contentType: PNG, outcome: 'wrong_type' },
  ];
}

/** Repeats the last scan of a progressive JPEG, so that it has that many more. */
function withMoreScans(jpeg: Buffer, more: number): Buffer {
  const lastScan = jpeg.subarray(jpeg.lastIndexOf(Buffer.from([0xff, 0xda])), -2);
  return Buffer.concat([jpeg.subarray(0, -2), ...Array.from({ length: more }, () => lastScan), jpeg.subarray(-2)]);
}

function withDeclaredSize(jpeg: Buffer, widthPx: number, heightPx: number): Buffer {
  const out = Buffer.from(jpeg);
  const frame = out.indexOf(Buffer.from([0xff, 0xc0, 0, 0x11]));
  out.writeUInt16BE(heightPx, frame + 5);
  out.writeUInt16BE(widthPx, frame + 7);
  return out;
}

function overwritten(bytes: Buffer, from: number, values: number[]): Buffer {
  const out = Buffer.from(bytes);
  out.set(values, from);
  return out;
}

async function jpegs(): Promise<HostilePicture[]> {
  const good = await noise(400, 300).jpeg().toBuffer();
  const scan = good.indexOf(Buffer.from([0xff, 0xda]));
  const progressive = await noise(400, 300).jpeg({ progressive: true }).toBuffer();
  const tables = good.indexOf(Buffer.from([0xff, 0xc4]));
  const png = await noise(20, 20).png().toBuffer();
  const zeros = Array.from({ length: 64 }, () => 0);
  return rowsAs(JPEG, [
    ['only the first three bytes', good.subarray(0, 3), 'truncated'],
    ['cut in its tables', good.subarray(0, tables + 40), 'truncated'],
    ['cut at the start of its scan', good.subarray(0, scan + 4), 'truncated'],
    ['cut in half', good.subarray(0, good.length / 2), 'truncated'],
    ['without its last byte', good.subarray(0, -1), 'truncated'],
    ['an end right after the start', Buffer.from([0xff, 0xd8, 0xff, 0xd9]), 'failed'],
    ['a frame and an end but no scan', Buffer.concat([good.subarray(0, scan), good.subarray(-2)]), 'failed'],
    [
      'an end in the middle of its scan',
      Buffer.concat([good.subarray(0, scan + 3000), good.subarray(-2)]),
      'truncated',
    ],
    ['nothing but fill bytes', Buffer.alloc(200_000, 0xff).fill(0xd8, 1, 2), 'truncated'],
    ['a segment of length zero', withSegments(good, Buffer.from([0xff, 0xe5, 0, 0])), 'taken'],
    [
      'a segment longer than the file',
      Buffer.concat([good.subarray(0, 2), Buffer.from([0xff, 0xe5, 0xff, 0xff]), good.subarray(2, 5000)]),
      'truncated',
    ],
    [
      'tables overwritten',
      overwritten(
        good,
        tables + 5,
        zeros.map(() => 0xaa),
      ),
      'failed',
    ],
    ['codes in its scan overwritten', overwritten(good, scan + 4000, zeros), 'taken'],
    ['declared 65 535 x 65 535', withDeclaredSize(good, 65_535, 65_535), 'too_many_pixels'],
    ['declared 12 001 x 1', withDeclaredSize(good, 12_001, 1), 'too_many_pixels'],
    ['declared 8 000 x 8 000', withDeclaredSize(good, 8000, 8000), 'too_many_pixels'],
    ['declared 7 000 x 7 000 over a small scan', withDeclaredSize(good, 7000, 7000), 'truncated'],
    ['declared 0 x 300', withDeclaredSize(good, 0, 300), 'failed'],
    ['101 scans and more', withMoreScans(progressive, 101), 'too_slow'],
    ['80 scans more, out of order', withMoreScans(progressive, 80), 'failed'],
    [
      '49 megapixels in many scans',
      withMoreScans(await flat(7000, 7000).jpeg({ progressive: true }).toBuffer(), 85),
      'failed',
    ],
    ['CMYK', await noise(90, 60).toColourspace('cmyk').jpeg().toBuffer(), 'taken'],
    ['greyscale', await noise(90, 60).greyscale().jpeg().toBuffer(), 'taken'],
    ['orientation 0', withSegments(good, exifSegment({ orientation: 0 })), 'taken'],
    ['orientation 9', withSegments(good, exifSegment({ orientation: 9 })), 'taken'],
    ['orientation 65 535', withSegments(good, exifSegment({ orientation: 65_535 })), 'taken'],
    [
      'EXIF that is noise',
      withSegments(good, jpegSegment(0xe1, Buffer.concat([Buffer.from('Exif\0\0'), Buffer.alloc(900, 0xa7)]))),
      'taken',
    ],
    [
      'EXIF whose directory points at itself',
      withSegments(good, jpegSegment(0xe1, Buffer.from('Exif\0\0MM\0*\0\0\0\x08\0\0\0\0\0\x08', 'latin1'))),
      'taken',
    ],
    [
      'a thumbnail inside',
      withSegments(good, exifSegment({ thumbnail: await flat(16, 12).jpeg().toBuffer() })),
      'taken',
    ],
    ['a profile that is noise', withSegments(good, ...iccSegments(Buffer.alloc(900, 0x5c))), 'taken'],
    ['a profile of 12 MB', withSegments(good, ...iccSegments(Buffer.alloc(12_000_000, 0x33))), 'taken'],
    [
      '5 000 comments',
      withSegments(good, ...Array.from({ length: 5000 }, () => jpegSegment(0xfe, Buffer.from(SCRIPT)))),
      'taken',
    ],
    ['a zip behind it', Buffer.concat([good, ZIP]), 'taken'],
    ['a page behind it', Buffer.concat([good, Buffer.from(SCRIPT)]), 'taken'],
    ['a PNG behind it', Buffer.concat([good, png]), 'taken'],
    [
      'padding before its end, as some phones leave',
      Buffer.concat([progressive.subarray(0, -2), Buffer.alloc(8), good.subarray(-2)]),
      'taken',
    ],
    [
      'scan parameters filled in wrongly, as some phones do',
      overwritten(good, scan + 2 + good.readUInt16BE(scan + 2) - 2, [0]),
      'taken',
    ],
    ['1 x 1', await flat(1, 1).jpeg().toBuffer(), 'taken'],
  ]);
}

const rawRows = (rowBytes: number, heightPx: number) => Buffer.alloc((rowBytes + 1) * heightPx, 0);

async function pngs(): Promise<HostilePicture[]> {
  const good = await noise(300, 200).png().toBuffer();
  const bomb = deflateSync(Buffer.alloc(200_000_000, 65));
  const keyed = (key: string) => Buffer.concat([Buffer.from(key, 'latin1'), bomb]);
  const texts = Array.from({ length: 20_000 }, (_, i) => pngChunk('tEXt', Buffer.from(`k${i}\0v`)));
  return rowsAs(PNG, [
    ['only its signature', good.subarray(0, 8), 'truncated'],
    ['cut in half', good.subarray(0, good.length / 2), 'truncated'],
    ['without its end', good.subarray(0, -12), 'truncated'],
    ['a chunk of 4 GB declared', withChunks(good, Buffer.from('\xff\xff\xff\xfftEXt', 'latin1')), 'truncated'],
    [
      'declared 2 147 483 647 a side',
      handMadePng({ widthPx: 2_147_483_647, heightPx: 2_147_483_647 }, rawRows(9, 1)),
      'too_many_pixels',
    ],
    ['declared 12 000 x 12 000', handMadePng({ widthPx: 12_000, heightPx: 12_000 }, rawRows(9, 1)), 'too_many_pixels'],
    [
      'declared 7 000 x 7 000 over one row',
      handMadePng({ widthPx: 7000, heightPx: 7000 }, rawRows(21_000, 1)),
      'failed',
    ],
    ['declared 0 x 0', handMadePng({ widthPx: 0, heightPx: 0 }, rawRows(3, 1)), 'failed'],
    ['49 megapixels of one colour', handMadePng({ widthPx: 7000, heightPx: 7000 }, rawRows(21_000, 7000)), 'taken'],
    [
      '49 megapixels, 16 bits, four channels, interlaced',
      handMadePng(
        { widthPx: 7000, heightPx: 7000, bitDepth: 16, colourType: 6, interlaced: true },
        rawRows(56_000, 7010),
      ),
      'too_slow',
    ],
    ['image data that goes on and on', handMadePng({ widthPx: 10, heightPx: 10 }, rawRows(30, 3_000_000)), 'taken'],
    ['a wrong checksum on its data', overwritten(good, good.length - 16, [1, 2, 3, 4]), 'failed'],
    ['a wrong checksum on its text', withChunks(good, pngChunk('tEXt', Buffer.from('k\0v'), 1)), 'taken'],
    [
      'a colour type that does not exist',
      handMadePng({ widthPx: 4, heightPx: 4, colourType: 5 }, rawRows(12, 4)),
      'failed',
    ],
    ['a palette missing', handMadePng({ widthPx: 4, heightPx: 4, colourType: 3 }, rawRows(4, 4)), 'failed'],
    ['a zTXt bomb', withChunks(good, pngChunk('zTXt', keyed('k\0\0'))), 'taken'],
    ['an iTXt bomb', withChunks(good, pngChunk('iTXt', keyed('XML:com.adobe.xmp\0\x01\0\0\0'))), 'taken'],
    ['an iCCP bomb', withChunks(good, pngChunk('iCCP', keyed('icc\0\0'))), 'taken'],
    ['20 000 texts', withChunks(good, ...texts), 'taken'],
    ['16 bits', await noise(60, 40).toColourspace('rgb16').png().toBuffer(), 'taken'],
    ['a palette with transparency', await noise(60, 40).ensureAlpha(0.4).png({ palette: true }).toBuffer(), 'taken'],
    ['animation frames', withChunks(good, pngChunk('acTL', Buffer.from([0, 0, 255, 255, 0, 0, 0, 0]))), 'taken'],
    ['12 000 x 1', await flat(12_000, 1).png().toBuffer(), 'taken'],
    ['1 x 12 000', await flat(1, 12_000).png().toBuffer(), 'taken'],
    ['12 001 x 1', await flat(12_001, 1).png().toBuffer(), 'too_many_pixels'],
    ['a zip behind it', Buffer.concat([good, ZIP]), 'taken'],
  ]);
}

async function webps(): Promise<HostilePicture[]> {
  const good = await noise(300, 200).webp().toBuffer();
  const frames = Buffer.concat(await Promise.all([1, 2, 3].map(() => noise(40, 40).raw().toBuffer())));
  const animated = await sharp(frames, { raw: { width: 40, height: 120, channels: 3, pageHeight: 40 } })
    .webp({ loop: 0 })
    .toBuffer();
  const lossless = (packed: number) => {
    const data = Buffer.alloc(18);
    data.writeUInt8(0x2f, 0);
    data.writeUInt32LE(packed, 1);
    return webpFile(riffChunk('VP8L', data));
  };
  const canvas = Buffer.from([0, 0, 0, 0, 0xff, 0xff, 0xff, 0xff, 0xff, 0xff]);
  const smallCanvas = Buffer.from([0, 0, 0, 0, 9, 0, 0, 9, 0, 0]);
  return rowsAs(WEBP, [
    ['only its first 12 bytes', good.subarray(0, 12), 'truncated'],
    ['268 megapixels in 38 bytes', lossless(0x0fffffff), 'too_many_pixels'],
    ['49 megapixels in 38 bytes', lossless(6999 | (6999 << 14)), 'failed'],
    ['a canvas of 16 777 216 a side', webpFile(riffChunk('VP8X', canvas), good.subarray(12)), 'too_many_pixels'],
    ['a canvas smaller than its frame', webpFile(riffChunk('VP8X', smallCanvas), good.subarray(12)), 'failed'],
    ['no frame at all', webpFile(riffChunk('EXIF', Buffer.alloc(40))), 'failed'],
    ['cut in half', good.subarray(0, good.length / 2), 'truncated'],
    ['declared shorter than its frame', overwritten(good, 4, [100, 0, 0, 0]), 'failed'],
    [
      'its frame overwritten',
      overwritten(
        good,
        60,
        Array.from({ length: 200 }, () => 0xff),
      ),
      'taken',
    ],
    ['animated', animated, 'taken'],
    ['transparent', await noise(60, 40).ensureAlpha(0).webp().toBuffer(), 'taken'],
    ['a page behind it', Buffer.concat([good, Buffer.from(SCRIPT)]), 'taken'],
  ]);
}

/** Files nobody should be harmed by, each with what must become of it. */
export async function hostilePictures(): Promise<HostilePicture[]> {
  const groups = await Promise.all([notPhotos(), brokenPromises(), jpegs(), pngs(), webps()]);
  return groups.flat();
}
