import { exifSegment, iccSegments, jpegSegment, withSegments } from './picture-bytes';
import { JPEG, SCRIPT, ZIP, flat, noise, overwritten, rowsAs, type HostilePicture } from './hostile-rows';

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

export async function hostileJpegs(): Promise<HostilePicture[]> {
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
