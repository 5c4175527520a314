import sharp from 'sharp';
import type { PhotoRefusalCode } from '@/lib/photos/refusals';

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

export const JPEG = 'image/jpeg';
export const PNG = 'image/png';
export const WEBP = 'image/webp';

export function rowsAs(contentType: string, rows: readonly Row[]): HostilePicture[] {
  return rows.map(([name, bytes, outcome]) => ({ name, contentType, outcome, bytes: Buffer.from(bytes) }));
}

export const ZIP = Buffer.from('PK\x03\x04\x14\0\0\0\0\0notes.txt', 'latin1');
export const SCRIPT = '<script>fetch("https://canary.example/")</script>';
export const noise = (width: number, height: number) =>
  sharp({
    create: { width, height, channels: 3, background: '#777', noise: { type: 'gaussian', mean: 128, sigma: 40 } },
  });
export const flat = (width: number, height: number) =>
  sharp({ create: { width, height, channels: 3, background: '#8a5a2b' } });

export function overwritten(bytes: Buffer, from: number, values: number[]): Buffer {
  const out = Buffer.from(bytes);
  out.set(values, from);
  return out;
}
