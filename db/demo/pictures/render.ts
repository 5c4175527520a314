import { type Camera, type Lens, lensFor, project } from './camera';
import { type Light, surroundings } from './light';
import type { Sample } from './material';
import { type Vec3, unit } from './mesh';
import { type Projected, rasterise } from './raster';
import { real, whole } from './reading';
import type { Packed, Scene } from './scene';
import { type Shade, shadeOf } from './shadow';

/** Linear light, three values a pixel, and the nearness (1 / cm) of what each pixel shows. */
export type Exposure = { width: number; height: number; light: Float32Array; near: Float32Array };

type Job = { packed: Packed; lens: Lens; light: Light; key: Vec3; shade: Shade; projected: Projected };

const sample: Sample = {
  x: 0,
  y: 0,
  z: 0,
  facing: 0,
  edge: 0,
  footprint: 0,
  r: 0,
  g: 0,
  b: 0,
  rough: 0,
  coat: 0,
  coatRough: 0,
  metal: 0,
  bumpX: 0,
  bumpY: 0,
  opacity: 1,
  glow: 0,
};

/** Takes the picture. Every pixel is looked at through four points; it is lit once where they agree. */
export function expose(scene: Scene, camera: Camera, light: Light, width: number, height: number): Exposure {
  const packed = scene.packed();
  const lens = lensFor(camera, width, height);
  const projected = project(packed.world, lens);
  const job = { packed, lens, light, key: unit(light.key), shade: shadeOf(packed, light), projected };
  const isFilm = (triangle: number) => packed.materials[whole(packed.surfaces, triangle)]?.layer === 'film';
  const plane = { width: width * 2, height: height * 2 };
  const near = new Float32Array(plane.width * plane.height);
  const solids = new Int32Array(near.length).fill(-1);
  rasterise(projected, packed.triangles, { ...plane, near, ids: solids }, (triangle) => !isFilm(triangle));
  const exposure = {
    width,
    height,
    light: new Float32Array(width * height * 3),
    near: new Float32Array(width * height),
  };
  const films = new Int32Array(near.length).fill(-1);
  const nearest = Float32Array.from(near);
  rasterise(projected, packed.triangles, { ...plane, near: nearest, ids: films }, isFilm);
  for (let row = 0; row < height; row++)
    for (let column = 0; column < width; column++) {
      const corner = row * 2 * plane.width + column * 2;
      exposure.near[row * width + column] = real(near, corner);
      lightPixel(job, exposure.light, (row * width + column) * 3, solids, films, near, corner, column, row);
    }
  return exposure;
}

function lightPixel(
  job: Job,
  out: Float32Array,
  target: number,
  solids: Int32Array,
  films: Int32Array,
  near: Float32Array,
  corner: number,
  column: number,
  row: number,
) {
  const below = job.lens.width * 2 - 2;
  const first = whole(solids, corner);
  let same = true;
  for (let index = 1; index < 4 && same; index++) {
    const spot = corner + index + (index >> 1) * below;
    same = agree(job.packed, first, whole(solids, spot), real(near, corner), real(near, spot));
  }
  const jitter = (52.9829189 * ((0.06711056 * column + 0.00583715 * row) % 1)) % 1;
  const share = same ? 1 : 0.25;
  for (let index = 0; index < (same ? 1 : 4); index++) {
    const spot = corner + index + (index >> 1) * below;
    const dx = same ? 0.5 : index & 1;
    const dy = same ? 0.5 : index >> 1;
    lightPoint(job, whole(solids, spot), column * 2 + dx, row * 2 + dy, jitter);
    out[target] = real(out, target) + sample.r * share;
    out[target + 1] = real(out, target + 1) + sample.g * share;
    out[target + 2] = real(out, target + 2) + sample.b * share;
  }
  for (let index = 0; index < 4; index++) {
    const film = whole(films, corner + index + (index >> 1) * below);
    if (film < 0) continue;
    lightPoint(job, film, column * 2 + (index & 1), row * 2 + (index >> 1), jitter);
    const cover = sample.opacity / 4;
    out[target] = real(out, target) * (1 - cover) + sample.r * cover;
    out[target + 1] = real(out, target + 1) * (1 - cover) + sample.g * cover;
    out[target + 2] = real(out, target + 2) * (1 - cover) + sample.b * cover;
  }
}

function agree(packed: Packed, a: number, b: number, nearA: number, nearB: number): boolean {
  if (a === b) return true;
  if (a < 0 || b < 0 || packed.surfaces[a] !== packed.surfaces[b]) return false;
  if (Math.abs(nearA - nearB) > nearA * 0.006) return false;
  const [i, j] = [whole(packed.triangles, a * 3) * 3, whole(packed.triangles, b * 3) * 3];
  const { normals } = packed;
  return (
    real(normals, i) * real(normals, j) +
      real(normals, i + 1) * real(normals, j + 1) +
      real(normals, i + 2) * real(normals, j + 2) >
    0.93
  );
}

function lightPoint(job: Job, triangle: number, px: number, py: number, jitter: number) {
  sample.r = 0.012;
  sample.g = 0.013;
  sample.b = 0.015;
  if (triangle < 0) return;
  const { packed, projected, lens } = job;
  const [a, b, c] = [
    whole(packed.triangles, triangle * 3),
    whole(packed.triangles, triangle * 3 + 1),
    whole(packed.triangles, triangle * 3 + 2),
  ];
  const [ax, ay, bx, by] = [real(projected.x, a), real(projected.y, a), real(projected.x, b), real(projected.y, b)];
  const [cx, cy] = [real(projected.x, c), real(projected.y, c)];
  const area = (bx - ax) * (cy - ay) - (cx - ax) * (by - ay);
  let u = (((bx - px) * (cy - py) - (cx - px) * (by - py)) / area) * real(projected.near, a);
  let v = (((cx - px) * (ay - py) - (ax - px) * (cy - py)) / area) * real(projected.near, b);
  let w = (((ax - px) * (by - py) - (bx - px) * (ay - py)) / area) * real(projected.near, c);
  const sum = u + v + w;
  u /= sum;
  v /= sum;
  w /= sum;
  const mix = (values: Float32Array, part: number) =>
    real(values, a * 3 + part) * u + real(values, b * 3 + part) * v + real(values, c * 3 + part) * w;
  const [x, y, z] = [mix(packed.world, 0), mix(packed.world, 1), mix(packed.world, 2)];
  sample.x = mix(packed.local, 0);
  sample.y = mix(packed.local, 1);
  sample.z = mix(packed.local, 2);
  sample.edge = real(packed.edges, a) * u + real(packed.edges, b) * v + real(packed.edges, c) * w;
  sample.footprint = 1 / (sum * lens.scale);
  let [nx, ny, nz] = [mix(packed.normals, 0), mix(packed.normals, 1), mix(packed.normals, 2)];
  const [ex, ey, ez] = [lens.eye[0] - x, lens.eye[1] - y, lens.eye[2] - z];
  const distance = Math.sqrt(ex * ex + ey * ey + ez * ez);
  const flip = nx * ex + ny * ey + nz * ez < 0 ? -1 : 1;
  const length = Math.sqrt(nx * nx + ny * ny + nz * nz) * flip || 1;
  nx /= length;
  ny /= length;
  nz /= length;
  sample.facing = nz;
  sample.rough = 0.6;
  sample.coat = 0;
  sample.coatRough = 0.1;
  sample.metal = 0;
  sample.bumpX = 0;
  sample.bumpY = 0;
  sample.opacity = 1;
  sample.glow = 0;
  packed.materials[whole(packed.surfaces, triangle)]?.paint(sample);
  light(job, x, y, z, nx, ny, nz, ex / distance, ey / distance, ez / distance, jitter);
}

function light(
  job: Job,
  x: number,
  y: number,
  z: number,
  flatX: number,
  flatY: number,
  flatZ: number,
  vx: number,
  vy: number,
  vz: number,
  jitter: number,
) {
  const { light: lamp, key, shade } = job;
  const [bentX, bentY] = [flatX + sample.bumpX, flatY + sample.bumpY];
  const long = Math.sqrt(bentX * bentX + bentY * bentY + flatZ * flatZ);
  const [nx, ny, nz] = [bentX / long, bentY / long, flatZ / long];
  const lean = nx * key[0] + ny * key[1] + nz * key[2];
  const facing = Math.max(0.001, nx * vx + ny * vy + nz * vz);
  const open = shade.openness(x + flatX * 0.3, y + flatY * 0.3, z + flatZ * 0.15, flatX, flatY);
  const share = lean > 0 ? shade.keyShare(x + flatX * 0.1, y + flatY * 0.1, z + flatZ * 0.1, jitter) : 0;
  const [mx, my, mz] = [2 * facing * nx - vx, 2 * facing * ny - vy, 2 * facing * nz - vz];
  const graze = (1 - facing) * (1 - facing);
  const fresnel = graze * graze * (1 - facing);
  const dull = 1 - sample.metal;
  const upper = nz * 0.5 + 0.5;
  const side = Math.max(0, -nx) * 0.5 + Math.max(0, -ny) * 0.55 + Math.max(0, nx) * 0.15;
  const direct = Math.max(0, lean) * share;
  const mirror = surroundings(lamp, mx, my, mz, sample.rough) * (0.35 + 0.65 * open);
  const spark = share * lobe(nx, ny, nz, key, vx, vy, vz, sample.rough);
  const base = 0.04 * dull * (1 - 0.85 * sample.rough);
  const sheen = (base + (1 - base) * fresnel * (1 - sample.rough) * (1 - sample.rough)) * dull;
  const coat = sample.coat > 0 ? sample.coat * (0.045 + 0.95 * fresnel) : 0;
  const gloss =
    coat > 0
      ? coat *
        (surroundings(lamp, mx, my, mz, sample.coatRough) * (0.4 + 0.6 * open) +
          share * lobe(nx, ny, nz, key, vx, vy, vz, sample.coatRough + 0.06))
      : 0;
  const through = 1 - coat;
  const tone = (albedo: number, sky: number, bounce: number, sun: number) => {
    const ambient = (bounce + (sky - bounce) * upper + side * sky) * open;
    const body = albedo * dull * (ambient + sun * direct);
    const shine = (mirror + spark * sun) * (sheen + albedo * sample.metal);
    return (body + shine) * through + gloss + albedo * sample.glow;
  };
  sample.r = tone(sample.r, lamp.sky[0], lamp.bounce[0], lamp.keyColour[0]);
  sample.g = tone(sample.g, lamp.sky[1], lamp.bounce[1], lamp.keyColour[1]);
  sample.b = tone(sample.b, lamp.sky[2], lamp.bounce[2], lamp.keyColour[2]);
}

/** Brightness of the key light's highlight (a normalised power lobe about the half vector). */
function lobe(
  nx: number,
  ny: number,
  nz: number,
  key: Vec3,
  vx: number,
  vy: number,
  vz: number,
  rough: number,
): number {
  const [hx, hy, hz] = [key[0] + vx, key[1] + vy, key[2] + vz];
  const size = Math.sqrt(hx * hx + hy * hy + hz * hz) || 1;
  const cosine = (nx * hx + ny * hy + nz * hz) / size;
  if (cosine <= 0) return 0;
  const power = Math.max(2, 2 / Math.max(0.004, rough * rough * rough) - 2);
  const fade = power * (1 - cosine);
  return fade > 7 ? 0 : Math.exp(-fade) * Math.min(6, 0.25 + power * 0.03);
}
