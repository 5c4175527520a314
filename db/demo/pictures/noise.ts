const lerp = (a: number, b: number, t: number) => a + (b - a) * t;

function lattice(mixed: number): number {
  return (Math.imul(mixed ^ (mixed >>> 15), 0x2c1b3c6d) >>> 16) * (1 / 65535);
}

/** Smooth value noise over space, 0 to 1, with features about one unit across. */
export function noise3(x: number, y: number, z: number): number {
  const ix = Math.floor(x);
  const iy = Math.floor(y);
  const iz = Math.floor(z);
  const fx = x - ix;
  const fy = y - iy;
  const fz = z - iz;
  const tx = fx * fx * (3 - 2 * fx);
  const ty = fy * fy * (3 - 2 * fy);
  const tz = fz * fz * (3 - 2 * fz);
  const x0 = Math.imul(ix, 374761393);
  const x1 = Math.imul(ix + 1, 374761393);
  const y0 = Math.imul(iy, 668265263);
  const y1 = Math.imul(iy + 1, 668265263);
  const z0 = Math.imul(iz, 1440662683);
  const z1 = Math.imul(iz + 1, 1440662683);
  const near = lerp(
    lerp(lattice(x0 ^ y0 ^ z0), lattice(x1 ^ y0 ^ z0), tx),
    lerp(lattice(x0 ^ y1 ^ z0), lattice(x1 ^ y1 ^ z0), tx),
    ty,
  );
  const far = lerp(
    lerp(lattice(x0 ^ y0 ^ z1), lattice(x1 ^ y0 ^ z1), tx),
    lerp(lattice(x0 ^ y1 ^ z1), lattice(x1 ^ y1 ^ z1), tx),
    ty,
  );
  return lerp(near, far, tz);
}

/** Two octaves, 0 to 1. */
export const cloud = (x: number, y: number, z: number) =>
  noise3(x, y, z) * 0.66 + noise3(x * 2.17 + 9, y * 2.17 + 3, z * 2.17 + 5) * 0.34;

export function smooth(low: number, high: number, value: number): number {
  const t = Math.min(1, Math.max(0, (value - low) / (high - low)));
  return t * t * (3 - 2 * t);
}
