import { writeFile } from 'node:fs/promises';
import sharp, { type Exif } from 'sharp';
import { iccSegments, jpegSegment, withSegments } from './picture-bytes';

export interface PhotoShape {
  /** Size as stored, before any turn. */
  widthPx: number;
  heightPx: number;
  /** EXIF orientation, 1 to 8 (CIPA DC-008). */
  orientation?: number;
  /** Writes a position at 47 N 8 E into EXIF and XMP. */
  gps?: boolean;
  /** Local time as EXIF writes it: `2026:11:03 14:05:09`. */
  cameraTime?: string;
  quality?: number;
  progressive?: boolean;
  /** Another seed, another picture. */
  seed?: number;
}

/** Pixels like planed wood: long grain lines, a slow shade over the board, fine noise. */
function woodPixels(widthPx: number, heightPx: number, seed: number): Buffer {
  const pixels = Buffer.allocUnsafe(widthPx * heightPx * 3);
  let noise = (seed + 1) * 2_654_435_761;
  for (let y = 0, at = 0; y < heightPx; y++) {
    for (let x = 0; x < widthPx; x++, at += 3) {
      noise = (Math.imul(noise, 1_664_525) + 1_013_904_223) >>> 0;
      const grain =
        Math.sin((y + 9 * Math.sin(x / 90 + seed)) / 3) * 18 + Math.sin(x / 200) * 20 + ((noise >>> 24) - 128) / 10;
      pixels[at] = 150 + grain;
      pixels[at + 1] = 105 + grain * 0.8;
      pixels[at + 2] = 66 + grain * 0.6;
    }
  }
  return pixels;
}

function exifOf({ gps = false, cameraTime }: PhotoShape): Exif {
  return {
    IFD0: { Make: 'Test camera', Artist: 'Bench hand', ImageDescription: 'unreleased model' },
    ...(cameraTime && { IFD2: { DateTimeOriginal: cameraTime, BodySerialNumber: 'SN-0001' } }),
    ...(gps && {
      IFD3: { GPSLatitudeRef: 'N', GPSLatitude: '47/1 22/1 30/1', GPSLongitudeRef: 'E', GPSLongitude: '8/1 32/1 0/1' },
    }),
  };
}

const XMP = `<?xpacket begin="" id="W5M0MpCehiHzreSzNTczkc9d"?><x:xmpmeta xmlns:x="adobe:ns:meta/"><rdf:RDF xmlns:rdf="http://www.w3.org/1999/02/22-rdf-syntax-ns#"><rdf:Description rdf:about="" xmlns:exif="http://ns.adobe.com/exif/1.0/" exif:GPSLatitude="47,22.5N" exif:GPSLongitude="8,32.0E"/></rdf:RDF></x:xmpmeta><?xpacket end="w"?>`;

/** IPTC city and caption in an APP13 segment, as photo agencies write them (IIM 4.2, records 2:90 and 2:120). */
function iptcSegment(): Buffer {
  const record = (set: number, text: string) => Buffer.from([0x1c, 2, set, 0, text.length, ...Buffer.from(text)]);
  const iim = Buffer.concat([record(90, 'Quillhaven'), record(120, 'unreleased model')]);
  const head = Buffer.from('Photoshop 3.0\x008BIM\x04\x04\0\0\0\0\0\0', 'latin1');
  head.writeUInt32BE(iim.length, head.length - 4);
  return jpegSegment(0xed, Buffer.concat([head, iim, Buffer.alloc(iim.length % 2)]));
}

/** A JPEG as a phone takes it, with everything in it that must not be served: EXIF, IPTC, a comment and, asked for, GPS. */
export async function jpegWithExif(shape: PhotoShape): Promise<Buffer> {
  const { widthPx, heightPx, orientation = 1, gps = false, quality = 88, progressive = false, seed = 1 } = shape;
  const small = { width: Math.ceil(widthPx / 2), height: Math.ceil(heightPx / 2), channels: 3 } as const;
  let picture = sharp(woodPixels(small.width, small.height, seed), { raw: small })
    .resize(widthPx, heightPx, { fit: 'fill', kernel: 'nearest' })
    .withExif(exifOf(shape))
    .withMetadata({ orientation });
  if (gps) picture = picture.withXmp(XMP);
  const jpeg = await picture.jpeg({ quality, progressive }).toBuffer();
  return withSegments(jpeg, iptcSegment(), jpegSegment(0xfe, Buffer.from('taken in the wood room')));
}

/** The same in a file, for the file chooser of a browser test. Answers the path. */
export async function writePhoto(path: string, shape: PhotoShape): Promise<string> {
  await writeFile(path, await jpegWithExif(shape));
  return path;
}

/** One colour for each letter of the orientation table, far enough apart to be told after lossy coding. */
export const LETTER_COLOURS: Record<string, readonly [number, number, number]> = {
  a: [220, 40, 40],
  b: [40, 180, 60],
  c: [50, 70, 220],
  d: [230, 210, 50],
  e: [30, 30, 30],
  f: [240, 240, 240],
};

const CELL_PX = 48;

/** A picture of coloured squares, one a letter, rows divided by `/`: `abc/def` is three wide and two high. */
export async function letterJpeg(rows: string, orientation: number): Promise<Buffer> {
  const lines = rows.split('/');
  const width = (lines[0] ?? '').length;
  const cells = Buffer.from(
    lines.flatMap((line) => [...line].flatMap((letter) => LETTER_COLOURS[letter] ?? [0, 0, 0])),
  );
  return sharp(cells, { raw: { width, height: lines.length, channels: 3 } })
    .resize(width * CELL_PX, lines.length * CELL_PX, { fit: 'fill', kernel: 'nearest' })
    .withMetadata({ orientation })
    .jpeg({ quality: 95 })
    .toBuffer();
}

/** The letters shown by a picture of squares, read at the middle of each one. */
export async function readLetters(picture: Uint8Array): Promise<string> {
  const { data, info } = await sharp(picture).raw().toBuffer({ resolveWithObject: true });
  const letterAt = (x: number, y: number) => {
    const at = (y * info.width + x) * info.channels;
    const distance = (colour: readonly number[]) =>
      colour.reduce((sum, value, i) => sum + (value - (data[at + i] ?? 0)) ** 2, 0);
    return Object.entries(LETTER_COLOURS).sort(([, one], [, other]) => distance(one) - distance(other))[0]?.[0] ?? '?';
  };
  const middles = (sizePx: number) =>
    Array.from({ length: Math.round(sizePx / CELL_PX) }, (_, i) => (i + 0.5) * CELL_PX);
  return middles(info.height)
    .map((y) =>
      middles(info.width)
        .map((x) => letterAt(x, y))
        .join(''),
    )
    .join('/');
}

/** A flat JPEG whose numbers are Display P3 and whose profile says so, as phones take them. Values 0 to 1. */
export async function displayP3Jpeg(colour: readonly [number, number, number]): Promise<Buffer> {
  const create = { width: 96, height: 64, channels: 3, background: '#000' } as const;
  const { icc } = await sharp(await sharp({ create }).withIccProfile('p3').jpeg().toBuffer()).metadata();
  const [r, g, b] = colour.map((value) => Math.round(value * 255));
  const plain = await sharp({ create: { ...create, background: { r: r ?? 0, g: g ?? 0, b: b ?? 0 } } })
    .jpeg({ quality: 100, chromaSubsampling: '4:4:4' })
    .toBuffer();
  return withSegments(plain, ...iccSegments(Buffer.from(icc ?? [])));
}
