import sharp from 'sharp';
import { byte, real } from './reading';
import type { Exposure } from './render';

/** Four bytes a pixel; the fourth says how far out of focus it is, so that what is sharp does not smear. */
export type Frame = { width: number; height: number; pixels: Uint8Array };

export type Focus = {
  /** Distance in focus, cm, and the strength of the blur away from it. */
  focus: number;
  blur: number;
};

/** How far out of focus a point is, 0 to 1. */
export const softness = (near: number, { focus, blur }: Focus) =>
  Math.min(1, Math.max(0, Math.abs(near * focus - 1) - 0.035) * blur);

const SHRINK = 4;

const source = ({ width, height, pixels }: Frame) => sharp(pixels, { raw: { width, height, channels: 4 } });

async function blurred(frame: Frame, sigma: number): Promise<Frame> {
  return { ...frame, pixels: await source(frame).blur(Math.max(0.4, sigma)).raw().toBuffer() };
}

async function shrunk(frame: Frame): Promise<Frame> {
  const [width, height] = [Math.ceil(frame.width / SHRINK), Math.ceil(frame.height / SHRINK)];
  const small = source(frame).resize(width, height, { fit: 'fill', kernel: 'linear' });
  return { width, height, pixels: await small.raw().toBuffer() };
}

function brightParts(frame: Frame): Frame {
  const pixels = new Uint8Array(frame.pixels.length).fill(255);
  for (let index = 0; index < pixels.length; index++)
    if ((index & 3) < 3) pixels[index] = Math.max(0, byte(frame.pixels, index) - 190) * 2.2;
  return { ...frame, pixels };
}

/** Softens by distance from the focus and lets bright parts glow; three bytes a pixel come back. */
export async function focused(frame: Frame, exposure: Exposure, focus: Focus): Promise<Uint8Array> {
  const detail = frame.width / 1280;
  const small = await shrunk(frame);
  const [slight, soft, softest, glow] = await Promise.all([
    blurred(frame, 1.6 * detail),
    blurred(small, (4.5 * detail) / SHRINK),
    blurred(small, (10 * detail) / SHRINK),
    blurred(brightParts(small), frame.width / 60 / SHRINK),
  ]);
  const result = new Uint8Array(frame.width * frame.height * 3);
  const spot: Spot = { index: 0, below: 0, fx: 0, fy: 0 };
  for (let row = 0; row < frame.height; row++)
    for (let column = 0; column < frame.width; column++) {
      const pixel = row * frame.width + column;
      const place = softness(real(exposure.near, pixel), focus) * 3;
      locate(spot, small, column, row);
      for (let part = 0; part < 3; part++) {
        const first = place < 2 ? byte(slight.pixels, pixel * 4 + part) : 0;
        const base = layered(place, byte(frame.pixels, pixel * 4 + part), first, soft, softest, spot, part);
        result[pixel * 3 + part] = Math.min(255, base + mixedAt(glow.pixels, spot, part) * 0.35);
      }
    }
  return result;
}

type Spot = { index: number; below: number; fx: number; fy: number };

function locate(spot: Spot, small: Frame, column: number, row: number) {
  const x = Math.min(small.width - 1.001, Math.max(0, (column + 0.5) / SHRINK - 0.5));
  const y = Math.min(small.height - 1.001, Math.max(0, (row + 0.5) / SHRINK - 0.5));
  const [left, top] = [Math.floor(x), Math.floor(y)];
  spot.index = (top * small.width + left) * 4;
  spot.below = small.width * 4;
  spot.fx = x - left;
  spot.fy = y - top;
}

function mixedAt(pixels: Uint8Array, { index, below, fx, fy }: Spot, part: number): number {
  const at = index + part;
  const upper = byte(pixels, at) * (1 - fx) + byte(pixels, at + 4) * fx;
  const lower = byte(pixels, at + below) * (1 - fx) + byte(pixels, at + below + 4) * fx;
  return upper * (1 - fy) + lower * fy;
}

function layered(place: number, crisp: number, slight: number, soft: Frame, softest: Frame, spot: Spot, part: number) {
  if (place < 1) return crisp + (slight - crisp) * place;
  const middle = mixedAt(soft.pixels, spot, part);
  if (place < 2) return slight + (middle - slight) * (place - 1);
  return middle + (mixedAt(softest.pixels, spot, part) - middle) * (place - 2);
}
