import type { Sample } from './material';
import { real } from './reading';

/** The key light's part of each pixel, kept apart until its shadows have been smoothed. A share of -1 is no part. */
export type KeyLight = { width: number; height: number; light: Float32Array; share: Float32Array };

export const keyLight = (width: number, height: number): KeyLight => ({
  width,
  height,
  light: new Float32Array(width * height * 3),
  share: new Float32Array(width * height).fill(-1),
});

export function keepKey({ light, share }: KeyLight, pixel: number, sample: Sample) {
  light[pixel * 3] = sample.keyR;
  light[pixel * 3 + 1] = sample.keyG;
  light[pixel * 3 + 2] = sample.keyB;
  share[pixel] = sample.share;
}

/** A film in front lets only part of it through. */
export function veilKey({ light }: KeyLight, pixel: number, through: number) {
  for (let part = 0; part < 3; part++) light[pixel * 3 + part] = real(light, pixel * 3 + part) * through;
}

const REACH = 2;

/** Adds the key light; where a shadow fades, the few samples of each pixel are averaged with its neighbours'. */
export function addKeyLight(out: Float32Array, near: Float32Array, keyed: KeyLight) {
  const { width, height, light, share } = keyed;
  for (let row = 0; row < height; row++)
    for (let column = 0; column < width; column++) {
      const pixel = row * width + column;
      const own = real(share, pixel);
      if (own < 0) continue;
      const inside = row >= REACH && column >= REACH && row < height - REACH && column < width - REACH;
      const lit = inside && isFading(share, pixel, width, own) ? averaged(share, near, pixel, width) : own;
      for (let part = 0; part < 3; part++)
        out[pixel * 3 + part] = real(out, pixel * 3 + part) + real(light, pixel * 3 + part) * lit;
    }
}

function isFading(share: Float32Array, pixel: number, width: number, own: number): boolean {
  const [up, down] = [pixel - width * REACH, pixel + width * REACH];
  return (
    (own > 0 && own < 1) ||
    real(share, pixel - REACH) !== own ||
    real(share, pixel + REACH) !== own ||
    real(share, up) !== own ||
    real(share, down) !== own
  );
}

function averaged(share: Float32Array, near: Float32Array, pixel: number, width: number): number {
  const own = real(near, pixel);
  let sum = 0;
  let count = 0;
  for (let dy = -REACH; dy <= REACH; dy++)
    for (let dx = -REACH; dx <= REACH; dx++) {
      const other = pixel + dy * width + dx;
      const lit = real(share, other);
      if (lit < 0 || Math.abs(real(near, other) - own) > own * 0.012) continue;
      sum += lit;
      count++;
    }
  return sum / count;
}
