import type { Lens } from './camera';
import { type Light, surroundings } from './light';
import { freshSample, type Sample } from './material';
import { unit } from './mesh';
import type { Projected } from './raster';
import { real, whole } from './reading';
import type { Packed } from './scene';
import type { Shade } from './shadow';

export type Shading = {
  /** Holds the light of the last point: r, g, b without the key light, the key light's part, opacity. */
  sample: Sample;
  /** Lights one triangle where half-pixel (px, py) sees it; -1 is the dark beyond everything. */
  lightPoint: (triangle: number, px: number, py: number, jitter: number) => void;
};

/** Place, normal and direction to the eye. One object is reused: a picture lights over a million points. */
type Spot = {
  x: number;
  y: number;
  z: number;
  nx: number;
  ny: number;
  nz: number;
  vx: number;
  vy: number;
  vz: number;
  jitter: number;
};

export function createShading(packed: Packed, projected: Projected, lens: Lens, light: Light, shade: Shade): Shading {
  const sample = freshSample();
  const spot: Spot = { x: 0, y: 0, z: 0, nx: 0, ny: 0, nz: 0, vx: 0, vy: 0, vz: 0, jitter: 0 };
  const lamp = { ...light, key: unit(light.key) };
  const lightPoint = (triangle: number, px: number, py: number, jitter: number) => {
    if (triangle < 0) {
      sample.r = sample.g = sample.b = 0.012;
      sample.keyR = sample.keyG = sample.keyB = sample.share = 0;
      return;
    }
    spot.jitter = jitter;
    meet(packed, projected, lens, triangle, px, py, spot, sample);
    packed.materials[whole(packed.surfaces, triangle)]?.paint(sample);
    illuminate(spot, sample, lamp, shade);
  };
  return { sample, lightPoint };
}

function meet(
  packed: Packed,
  projected: Projected,
  lens: Lens,
  triangle: number,
  px: number,
  py: number,
  spot: Spot,
  sample: Sample,
) {
  const a = whole(packed.triangles, triangle * 3);
  const b = whole(packed.triangles, triangle * 3 + 1);
  const c = whole(packed.triangles, triangle * 3 + 2);
  const ax = real(projected.x, a) - px;
  const ay = real(projected.y, a) - py;
  const bx = real(projected.x, b) - px;
  const by = real(projected.y, b) - py;
  const cx = real(projected.x, c) - px;
  const cy = real(projected.y, c) - py;
  const area = (bx - ax) * (cy - ay) - (cx - ax) * (by - ay);
  const p = ((bx * cy - cx * by) / area) * real(projected.near, a);
  const q = ((cx * ay - ax * cy) / area) * real(projected.near, b);
  const r = ((ax * by - bx * ay) / area) * real(projected.near, c);
  const sum = p + q + r;
  const u = p / sum;
  const v = q / sum;
  const w = r / sum;
  const { world, local, normals, edges } = packed;
  spot.x = between(world, a * 3, b * 3, c * 3, u, v, w);
  spot.y = between(world, a * 3 + 1, b * 3 + 1, c * 3 + 1, u, v, w);
  spot.z = between(world, a * 3 + 2, b * 3 + 2, c * 3 + 2, u, v, w);
  spot.nx = between(normals, a * 3, b * 3, c * 3, u, v, w);
  spot.ny = between(normals, a * 3 + 1, b * 3 + 1, c * 3 + 1, u, v, w);
  spot.nz = between(normals, a * 3 + 2, b * 3 + 2, c * 3 + 2, u, v, w);
  face(spot, lens);
  reset(sample);
  sample.x = between(local, a * 3, b * 3, c * 3, u, v, w);
  sample.y = between(local, a * 3 + 1, b * 3 + 1, c * 3 + 1, u, v, w);
  sample.z = between(local, a * 3 + 2, b * 3 + 2, c * 3 + 2, u, v, w);
  sample.edge = between(edges, a, b, c, u, v, w);
  sample.facing = spot.nz;
  sample.footprint = 1 / (sum * lens.scale);
}

const between = (values: Float32Array, a: number, b: number, c: number, u: number, v: number, w: number) =>
  real(values, a) * u + real(values, b) * v + real(values, c) * w;

/** Turns the normal to unit length and towards the eye. */
function face(spot: Spot, { eye }: Lens) {
  const ex = eye[0] - spot.x;
  const ey = eye[1] - spot.y;
  const ez = eye[2] - spot.z;
  const distance = Math.sqrt(ex * ex + ey * ey + ez * ez);
  const length = Math.sqrt(spot.nx * spot.nx + spot.ny * spot.ny + spot.nz * spot.nz) || 1;
  const turn = (spot.nx * ex + spot.ny * ey + spot.nz * ez < 0 ? -1 : 1) / length;
  spot.nx *= turn;
  spot.ny *= turn;
  spot.nz *= turn;
  spot.vx = ex / distance;
  spot.vy = ey / distance;
  spot.vz = ez / distance;
}

function reset(sample: Sample) {
  sample.rough = 0.6;
  sample.coat = 0;
  sample.coatRough = 0.1;
  sample.metal = 0;
  sample.bumpX = 0;
  sample.bumpY = 0;
  sample.opacity = 1;
  sample.glow = 0;
}

/** Turns the sample's colour into light: key with shadow, sky and bounce, mirrored room, clear coat. */
function illuminate(spot: Spot, sample: Sample, lamp: Light, shade: Shade) {
  const { x, y, z, nx: flatX, ny: flatY, nz: flatZ } = spot;
  const [keyX, keyY, keyZ] = lamp.key;
  const open = shade.openness(x + flatX * 0.3, y + flatY * 0.3, z + flatZ * 0.15, flatX, flatY);
  bend(spot, sample);
  const { nx, ny, nz, vx, vy, vz } = spot;
  const lean = nx * keyX + ny * keyY + nz * keyZ;
  const share = lean > 0 ? shade.keyShare(x + flatX * 0.1, y + flatY * 0.1, z + flatZ * 0.1, spot.jitter) : 0;
  const facing = Math.max(0.001, nx * vx + ny * vy + nz * vz);
  const mx = 2 * facing * nx - vx;
  const my = 2 * facing * ny - vy;
  const mz = 2 * facing * nz - vz;
  const graze = (1 - facing) * (1 - facing);
  const fresnel = graze * graze * (1 - facing);
  const { rough, coat, coatRough } = sample;
  const halfway = halfwayCosine(spot, keyX, keyY, keyZ);
  const dull = 1 - sample.metal;
  const base = 0.04 * dull * (1 - 0.85 * rough);
  const sheen = (base + (1 - base) * fresnel * (1 - rough) * (1 - rough)) * dull;
  const mirror = surroundings(lamp, mx, my, mz, rough) * (0.35 + 0.65 * open);
  const spark = lobe(halfway, rough);
  const clear = coat * (0.045 + 0.95 * fresnel);
  const room = coat > 0 ? surroundings(lamp, mx, my, mz, coatRough) * (0.4 + 0.6 * open) : 0;
  const gloss = clear * room;
  const glint = coat > 0 ? clear * lobe(halfway, coatRough + 0.06) : 0;
  const side = Math.max(0, -nx) * 0.5 + Math.max(0, -ny) * 0.55 + Math.max(0, nx) * 0.15;
  const up = nz * 0.5 + 0.5;
  const direct = Math.max(0, lean);
  const { sky, bounce, keyColour: sun } = lamp;
  const [red, green, blue] = [sample.r, sample.g, sample.b];
  const scatter = dull * (1 - clear);
  const metal = sample.metal;
  const under = 1 - clear;
  const fillR = (bounce[0] + (sky[0] - bounce[0]) * up + side * sky[0]) * open;
  const fillG = (bounce[1] + (sky[1] - bounce[1]) * up + side * sky[1]) * open;
  const fillB = (bounce[2] + (sky[2] - bounce[2]) * up + side * sky[2]) * open;
  sample.r = red * scatter * fillR + mirror * (sheen + red * metal) * under + gloss + red * sample.glow;
  sample.g = green * scatter * fillG + mirror * (sheen + green * metal) * under + gloss + green * sample.glow;
  sample.b = blue * scatter * fillB + mirror * (sheen + blue * metal) * under + gloss + blue * sample.glow;
  sample.keyR = sun[0] * (red * scatter * direct + spark * (sheen + red * metal) * under) + glint;
  sample.keyG = sun[1] * (green * scatter * direct + spark * (sheen + green * metal) * under) + glint;
  sample.keyB = sun[2] * (blue * scatter * direct + spark * (sheen + blue * metal) * under) + glint;
  sample.share = share;
}

function bend(spot: Spot, { bumpX, bumpY }: Sample) {
  const x = spot.nx + bumpX;
  const y = spot.ny + bumpY;
  const length = Math.sqrt(x * x + y * y + spot.nz * spot.nz) || 1;
  spot.nx = x / length;
  spot.ny = y / length;
  spot.nz /= length;
}

function halfwayCosine({ nx, ny, nz, vx, vy, vz }: Spot, keyX: number, keyY: number, keyZ: number): number {
  const hx = keyX + vx;
  const hy = keyY + vy;
  const hz = keyZ + vz;
  return (nx * hx + ny * hy + nz * hz) / (Math.sqrt(hx * hx + hy * hy + hz * hz) || 1);
}

/** Brightness of the key light's highlight: a power lobe about the halfway direction, in its exponential form. */
function lobe(cosine: number, rough: number): number {
  const power = Math.max(2, 2 / Math.max(0.004, rough * rough * rough) - 2);
  const fade = power * (1 - cosine);
  return fade > 7 ? 0 : Math.exp(-fade) * Math.min(6, 0.25 + power * 0.03);
}
