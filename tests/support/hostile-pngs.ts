import { deflateSync } from 'node:zlib';
import { handMadePng, pngChunk, withChunks } from './picture-bytes';
import { PNG, ZIP, flat, noise, overwritten, rowsAs, type HostilePicture } from './hostile-rows';

const rawRows = (rowBytes: number, heightPx: number) => Buffer.alloc((rowBytes + 1) * heightPx, 0);

export async function hostilePngs(): Promise<HostilePicture[]> {
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
