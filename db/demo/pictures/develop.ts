import sharp from 'sharp';
import { type Focus, focused, type Frame, softness } from './focus';
import type { Random } from './random';
import { byte, real } from './reading';
import type { Exposure } from './render';

export type Finish = Focus & { width: number; height: number; stops: number; warmth: number };

/** Tone, depth of field, glow, vignette and grain, then a JPEG without metadata. */
export async function develop(exposure: Exposure, finish: Finish, random: Random): Promise<Buffer> {
  const pixels = await focused(toned(exposure, finish), exposure, finish);
  const large = await sharp(pixels, { raw: { width: exposure.width, height: exposure.height, channels: 3 } })
    .resize(finish.width, finish.height, { kernel: 'cubic' })
    .sharpen({ sigma: 1.1, m1: 0.25, m2: 1.4 })
    .raw()
    .toBuffer();
  return sharp(grained(large, finish.width, finish.height, random), {
    raw: { width: finish.width, height: finish.height, channels: 3 },
  })
    .jpeg({ quality: 85 })
    .toBuffer();
}

/** A film-like curve: soft shoulder, display gamma. */
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
    pixels[index * 4 + 3] = 20 + 235 * softness(real(near, index), finish);
  }
  return { width, height, pixels };
}

/** Darker corners and the grain of a small sensor. */
function grained(pixels: Uint8Array, width: number, height: number, random: Random): Uint8ClampedArray {
  const tile = Float32Array.from({ length: 65536 }, () => (random() + random() + random() - 1.5) * 7);
  const [offsetX, offsetY] = [Math.floor(random() * 256), Math.floor(random() * 256)];
  const result = new Uint8ClampedArray(pixels.length);
  for (let row = 0; row < height; row++) {
    const dy = (row / height - 0.5) * 2;
    const line = ((row + offsetY) & 255) * 256;
    const shift = offsetX + (row >> 8) * 71;
    for (let column = 0; column < width; column++) {
      const dx = (column / width - 0.5) * 2;
      const far = dx * dx + dy * dy;
      const fall = 1 - 0.11 * far - 0.04 * far * far;
      const speck = real(tile, line + ((column + shift) & 255));
      const index = (row * width + column) * 3;
      result[index] = byte(pixels, index) * fall + speck;
      result[index + 1] = byte(pixels, index + 1) * fall + speck;
      result[index + 2] = byte(pixels, index + 2) * fall + speck;
    }
  }
  return result;
}
