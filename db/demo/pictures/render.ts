import { type Camera, type Lens, lensFor, project } from './camera';
import type { Light } from './light';
import { rasterise, type Plane, type Projected } from './raster';
import { real, whole } from './reading';
import { addKeyLight, keepKey, type KeyLight, keyLight, veilKey } from './penumbra';
import type { Packed, Scene } from './scene';
import { createShading, type Shading } from './shading';
import { shadeOf } from './shadow';

/** Linear light, three values a pixel, and the nearness (1 / cm) of what each pixel shows. */
export type Exposure = { width: number; height: number; light: Float32Array; near: Float32Array };

/** What each half-pixel shows: the nearest solid triangle and the nearest film in front of it. */
type Seen = { solids: Int32Array; films: Int32Array; near: Float32Array; hasFilm: boolean };

type Job = { packed: Packed; lens: Lens; seen: Seen; shading: Shading; out: Float32Array; keyed: KeyLight };

/** Takes the picture. Every pixel is looked at through four points; it is lit once where they agree. */
export function expose(scene: Scene, camera: Camera, light: Light, width: number, height: number): Exposure {
  const packed = scene.packed();
  const lens = lensFor(camera, width, height);
  const projected = project(packed.world, lens);
  const seen = look(packed, projected, { width: width * 2, height: height * 2 });
  const shading = createShading(packed, projected, lens, light, shadeOf(packed, light, Math.max(width, height)));
  const out = new Float32Array(width * height * 3);
  const near = new Float32Array(width * height);
  const keyed = keyLight(width, height);
  const job = { packed, lens, seen, shading, out, keyed };
  for (let row = 0; row < height; row++)
    for (let column = 0; column < width; column++) {
      near[row * width + column] = real(seen.near, row * 4 * width + column * 2);
      lightPixel(job, column, row);
    }
  addKeyLight(out, near, keyed);
  return { width, height, light: out, near };
}

function look(packed: Packed, projected: Projected, size: Pick<Plane, 'width' | 'height'>): Seen {
  const isFilm = (triangle: number) => packed.materials[whole(packed.surfaces, triangle)]?.layer === 'film';
  const near = new Float32Array(size.width * size.height);
  const solids = new Int32Array(near.length).fill(-1);
  rasterise(projected, packed.triangles, { ...size, near, ids: solids }, (triangle) => !isFilm(triangle));
  const hasFilm = packed.materials.some(({ layer }) => layer === 'film');
  if (!hasFilm) return { solids, films: solids, near, hasFilm };
  const films = new Int32Array(near.length).fill(-1);
  rasterise(projected, packed.triangles, { ...size, near: near.slice(), ids: films }, isFilm);
  return { solids, films, near, hasFilm };
}

function lightPixel({ packed, lens, seen, shading, out, keyed }: Job, column: number, row: number) {
  const corner = row * 4 * lens.width + column * 2;
  const below = lens.width * 2 - 2;
  const target = (row * lens.width + column) * 3;
  const turn = 0.06711056 * column + 0.00583715 * row;
  const slide = 52.9829189 * (turn - Math.floor(turn));
  const jitter = slide - Math.floor(slide);
  const { sample } = shading;
  const same = agreeAll(packed, seen, corner, below);
  const share = same ? 1 : 0.25;
  for (let index = 0; index < (same ? 1 : 4); index++) {
    const spot = corner + index + (index >> 1) * below;
    const dx = same ? 0.5 : index & 1;
    const dy = same ? 0.5 : index >> 1;
    shading.lightPoint(whole(seen.solids, spot), column * 2 + dx, row * 2 + dy, jitter);
    const lit = same ? 0 : sample.share;
    out[target] = real(out, target) + (sample.r + sample.keyR * lit) * share;
    out[target + 1] = real(out, target + 1) + (sample.g + sample.keyG * lit) * share;
    out[target + 2] = real(out, target + 2) + (sample.b + sample.keyB * lit) * share;
  }
  if (same) keepKey(keyed, target / 3, sample);
  if (!seen.hasFilm) return;
  let last = -1;
  for (let index = 0; index < 4; index++) {
    const film = whole(seen.films, corner + index + (index >> 1) * below);
    if (film < 0) continue;
    if (film !== last) shading.lightPoint(film, column * 2 + (index & 1), row * 2 + (index >> 1), jitter);
    last = film;
    const cover = filmCover(sample.opacity, index);
    veilKey(keyed, target / 3, 1 - cover);
    out[target] = real(out, target) * (1 - cover) + (sample.r + sample.keyR * sample.share) * cover;
    out[target + 1] = real(out, target + 1) * (1 - cover) + (sample.g + sample.keyG * sample.share) * cover;
    out[target + 2] = real(out, target + 2) * (1 - cover) + (sample.b + sample.keyB * sample.share) * cover;
  }
}

/** Share of one of four films laid over each other in turn, so that together they cover `opacity` of the pixel. */
const filmCover = (opacity: number, index: number) => (opacity * 0.25) / (1 - opacity * 0.25 * index);

function agreeAll(packed: Packed, { solids, near }: Seen, corner: number, below: number): boolean {
  const first = whole(solids, corner);
  const depth = real(near, corner);
  for (let index = 1; index < 4; index++) {
    const spot = corner + index + (index >> 1) * below;
    if (!agree(packed, first, whole(solids, spot), depth, real(near, spot))) return false;
  }
  return true;
}

/** True where two triangles are one smooth surface as far as the eye can tell. */
function agree(packed: Packed, a: number, b: number, nearA: number, nearB: number): boolean {
  if (a === b) return true;
  if (a < 0 || b < 0 || whole(packed.surfaces, a) !== whole(packed.surfaces, b)) return false;
  if (Math.abs(nearA - nearB) > nearA * 0.006) return false;
  const { normals, triangles } = packed;
  const i = whole(triangles, a * 3) * 3;
  const j = whole(triangles, b * 3) * 3;
  const x = real(normals, i) * real(normals, j);
  const y = real(normals, i + 1) * real(normals, j + 1);
  return x + y + real(normals, i + 2) * real(normals, j + 2) > 0.93;
}
