import { createHash } from 'node:crypto';
import { hostileJpegs } from './hostile-jpegs';
import { hostilePngs } from './hostile-pngs';
import { JPEG, PNG, SCRIPT, ZIP, flat, noise, rowsAs, type HostilePicture } from './hostile-rows';
import { hostileWebps } from './hostile-webps';

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

/** Files nobody should be harmed by, each with what must become of it. */
export async function hostilePictures(): Promise<HostilePicture[]> {
  const groups = await Promise.all([notPhotos(), brokenPromises(), hostileJpegs(), hostilePngs(), hostileWebps()]);
  return groups.flat();
}
