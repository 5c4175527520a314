import sharp from 'sharp';
import type { Random } from './random';
import { byte, real } from './reading';
import type { Exposure } from './render';

export type Finish = {
  width: number;
  height: number;
  /** Distance in focus, cm, and the strength of the blur away from it. */
  focus: number;
  blur: number;
  stops: number;
  warmth: number;
};

type Frame = { width: number; height: number; pixels: Uint8Array };

/** Tone, depth of field, glow, vignette and grain, then a JPEG without metadata. */
export async function develop(exposure: Exposure, finish: Finish, random: Random): Promise<Buffer> {
  const sharpest = toned(exposure, finish);
  const soft = await focused(sharpest, exposure, finish);
  const glow = await blurred({ ...soft, pixels: brightParts(soft.pixels) }, soft.width / 60);
  const lit = Uint8Array.from(soft.pixels);
  for (let index = 0; index < lit.length; index += 4)
    for (let part = 0; part < 3; part++)
      lit[index + part] = Math.min(255, byte(lit, index + part) + byte(glow.pixels, index + part) * 0.35);
  const raw = { width: soft.width, height: soft.height, channels: 4 as const };
  const large = await sharp(lit, { raw })
    .removeAlpha()
    .resize(finish.width, finish.height, { kernel: 'cubic' })
    .sharpen({ sigma: 1.1, m1: 0.6, m2: 1.6 })
    .raw()
    .toBuffer();
  return sharp(grained(large, finish.width, finish.height, random), {
    raw: { width: finish.width, height: finish.height, channels: 3 },
  })
    .jpeg({ quality: 85 })
    .toBuffer();
}

const TONES = Uint8Array.from({ length: 4096 }, (_, index) => {
  const value = (index / 4095) * 4;
  const curve = (value * (2.51 * value + 0.03)) / (value * (2.43 * value + 0.59) + 0.14);
  return Math.round(255 * Math.min(1, curve) ** (1 / 2.2));
});

const tone = (value: number) => byte(TONES, Math.min(4095, Math.max(0, Math.round(value * 1023.75))));

function toned({ width, height, light, near }: Exposure, finish: Finish): Frame {
  const gain = 0.72 * 2 ** finish.stops;
  const [red, blue] = [gain * (1 + finish.warmth), gain * (1 - finish.warmth)];
  const pixels = new Uint8Array(width * height * 4);
  for (let index = 0; index < width * height; index++) {
    pixels[index * 4] = tone(real(light, index * 3) * red);
    pixels[index * 4 + 1] = tone(real(light, index * 3 + 1) * gain);
    pixels[index * 4 + 2] = tone(real(light, index * 3 + 2) * blue);
    pixels[index * 4 + 3] = 20 + 235 * spreadAt(real(near, index), finish);
  }
  return { width, height, pixels };
}

/** How far out of focus a point is, 0 to 1. */
const spreadAt = (near: number, { focus, blur }: Finish) =>
  Math.min(1, Math.max(0, Math.abs(near * focus - 1) - 0.035) * blur);

async function blurred(frame: Frame, sigma: number): Promise<Frame> {
  const raw = { width: frame.width, height: frame.height, channels: 4 as const };
  const shrink = sigma > 4 ? 4 : 1;
  const [width, height] = [Math.ceil(frame.width / shrink), Math.ceil(frame.height / shrink)];
  const size = { width, height, fit: 'fill' as const, kernel: 'linear' as const };
  const small = await sharp(frame.pixels, { raw })
    .resize(size)
    .blur(Math.max(0.4, sigma / shrink))
    .raw()
    .toBuffer();
  if (shrink === 1) return { ...frame, pixels: small };
  const back = sharp(small, { raw: { width, height, channels: 4 } });
  const pixels = await back
    .resize({ ...size, width: frame.width, height: frame.height, kernel: 'cubic' })
    .raw()
    .toBuffer();
  return { ...frame, pixels };
}

/** Blends ever softer copies by distance from the focus; the alpha keeps what is sharp from smearing into them. */
async function focused(frame: Frame, exposure: Exposure, finish: Finish): Promise<Frame> {
  const unitSigma = frame.width / 1280;
  const steps = await Promise.all([1.6, 4.5, 10].map((sigma) => blurred(frame, sigma * unitSigma)));
  const layers = [frame, ...steps];
  const pixels = new Uint8Array(frame.pixels.length);
  for (let index = 0; index < frame.width * frame.height; index++) {
    const place = spreadAt(real(exposure.near, index), finish) * (layers.length - 1);
    const lower = Math.min(layers.length - 2, Math.floor(place));
    const [a, b] = [layers[lower]?.pixels ?? pixels, layers[lower + 1]?.pixels ?? pixels];
    for (let part = 0; part < 3; part++) {
      const from = byte(a, index * 4 + part);
      pixels[index * 4 + part] = from + (byte(b, index * 4 + part) - from) * (place - lower);
    }
    pixels[index * 4 + 3] = 255;
  }
  return { ...frame, pixels };
}

function brightParts(pixels: Uint8Array): Uint8Array {
  const bright = new Uint8Array(pixels.length).fill(255);
  for (let index = 0; index < pixels.length; index++)
    if ((index & 3) < 3) bright[index] = Math.max(0, byte(pixels, index) - 190) * 2.2;
  return bright;
}

function grained(pixels: Uint8Array, width: number, height: number, random: Random): Uint8Array {
  const tile = Float32Array.from({ length: 65536 }, () => (random() + random() + random() - 1.5) * 7);
  const [offsetX, offsetY] = [Math.floor(random() * 256), Math.floor(random() * 256)];
  for (let row = 0; row < height; row++)
    for (let column = 0; column < width; column++) {
      const [dx, dy] = [(column / width - 0.5) * 2, (row / height - 0.5) * 2];
      const fall = 1 - 0.17 * (dx * dx + dy * dy) ** 1.2;
      const speck = real(tile, ((row + offsetY) & 255) * 256 + ((column + offsetX + (row >> 8) * 71) & 255));
      const index = (row * width + column) * 3;
      for (let part = 0; part < 3; part++)
        pixels[index + part] = Math.max(0, Math.min(255, byte(pixels, index + part) * fall + speck));
    }
  return pixels;
}
