import type { Light } from './light';
import { cross, dot, unit, type Vec3 } from './mesh';
import { rasterise } from './raster';
import { byte, real } from './reading';
import type { Packed } from './scene';

/** Width of the shadow map: as fine as the picture asks for. */
const mapSize = (pictureWidth: number) => Math.min(1024, Math.max(160, pictureWidth));
const ROOM_SIZE = 256;

export type Shade = {
  /** Share of the key light that reaches a point; `jitter` in 0 to 1 turns the sampling pattern. */
  keyShare: (x: number, y: number, z: number, jitter: number) => number;
  /** Share of the surroundings that a point can see. */
  openness: (x: number, y: number, z: number, nx: number, ny: number) => number;
};

type Box = { low: [number, number]; high: [number, number] };

export function shadeOf(packed: Packed, light: Light, pictureWidth: number): Shade {
  return { keyShare: keyShareOf(packed, light, mapSize(pictureWidth)), openness: opennessOf(packed) };
}

function frame(packed: Packed, axisX: Vec3, axisY: Vec3, axisZ: Vec3, size: number, margin: number) {
  const count = packed.edges.length;
  const [x, y, near] = [new Float32Array(count), new Float32Array(count), new Float32Array(count)];
  const box: Box = { low: [Infinity, Infinity], high: [-Infinity, -Infinity] };
  const point = (index: number): Vec3 => [
    real(packed.world, index * 3),
    real(packed.world, index * 3 + 1),
    real(packed.world, index * 3 + 2),
  ];
  for (let index = 0; index < count; index++) {
    const p = point(index);
    x[index] = dot(p, axisX);
    y[index] = dot(p, axisY);
    near[index] = dot(p, axisZ) + 1000;
  }
  packed.triangles.forEach((vertex, index) => {
    if (!byte(packed.casts, Math.floor(index / 3))) return;
    box.low = [Math.min(box.low[0], real(x, vertex)), Math.min(box.low[1], real(y, vertex))];
    box.high = [Math.max(box.high[0], real(x, vertex)), Math.max(box.high[1], real(y, vertex))];
  });
  const span = Math.max(1, box.high[0] - box.low[0], box.high[1] - box.low[1]) + 2 * margin;
  const scale = size / span;
  const [left, low] = [box.low[0] - margin, box.low[1] - margin];
  for (let index = 0; index < count; index++) {
    x[index] = (real(x, index) - left) * scale;
    y[index] = (real(y, index) - low) * scale;
  }
  return { projected: { x, y, near }, scale, left, low };
}

/** Points of a small disc, spread evenly by the golden angle. */
const TURN_COS = Float32Array.from({ length: 64 }, (_, index) => Math.cos((index / 64) * 2 * Math.PI));
const TURN_SIN = Float32Array.from({ length: 64 }, (_, index) => Math.sin((index / 64) * 2 * Math.PI));
const TAPS = 8;
const tapAt = (turn: (angle: number) => number) =>
  Float32Array.from({ length: TAPS }, (_, index) => Math.sqrt((index + 0.5) / TAPS) * turn(index * 2.399963));
const DISC_X = tapAt(Math.cos);
const DISC_Y = tapAt(Math.sin);

function keyShareOf(packed: Packed, light: Light, size: number): Shade['keyShare'] {
  const toward = unit(light.key);
  const right = unit(cross([0, 1, 0], toward));
  const up = cross(toward, right);
  const { projected, scale, left, low } = frame(packed, right, up, toward, size, 1);
  const map = new Float32Array(size * size);
  rasterise(projected, packed.triangles, { width: size, height: size, near: map }, (t) => byte(packed.casts, t) === 1);
  const read = (u: number, v: number) => {
    const column = (u + 0.5) | 0;
    const row = (v + 0.5) | 0;
    return column < 0 || row < 0 || column >= size || row >= size ? 0 : real(map, row * size + column);
  };
  const [rightX, rightY, rightZ] = right;
  const [upX, upY, upZ] = up;
  const [keyX, keyY, keyZ] = toward;
  return (x, y, z, jitter) => {
    const u = (x * rightX + y * rightY + z * rightZ - left) * scale;
    const v = (x * upX + y * upY + z * upZ - low) * scale;
    if (u < -20 || v < -20 || u > size + 20 || v > size + 20) return 1;
    const depth = x * keyX + y * keyY + z * keyZ + 1000.08;
    const turn = Math.floor(jitter * 64) & 63;
    const c = real(TURN_COS, turn);
    const s = real(TURN_SIN, turn);
    const reach = scale * (0.35 + light.spread * 5);
    let blockers = 0;
    let gap = 0;
    for (let index = 1; index < TAPS; index += 2) {
      const dx = real(DISC_X, index);
      const dy = real(DISC_Y, index);
      const value = read(u + (dx * c - dy * s) * reach, v + (dx * s + dy * c) * reach);
      if (value <= depth) continue;
      blockers++;
      gap += value - depth;
    }
    if (blockers === 0) return 1;
    const radius = scale * Math.min(0.35 + light.spread * 5, 0.06 + (light.spread * gap) / blockers);
    let lit = 0;
    for (let index = 0; index < TAPS; index++) {
      const dx = real(DISC_X, index);
      const dy = real(DISC_Y, index);
      if (read(u + (dx * c - dy * s) * radius, v + (dx * s + dy * c) * radius) <= depth + (radius * 0.02) / scale)
        lit++;
    }
    return lit / TAPS;
  };
}

function opennessOf(packed: Packed): Shade['openness'] {
  const { projected, scale, left, low } = frame(packed, [1, 0, 0], [0, 1, 0], [0, 0, 1], ROOM_SIZE, 8);
  const heights = new Float32Array(ROOM_SIZE * ROOM_SIZE).fill(1000);
  const plane = { width: ROOM_SIZE, height: ROOM_SIZE, near: heights };
  rasterise(projected, packed.triangles, plane, (triangle) => byte(packed.casts, triangle) === 1);
  const close = spread(heights, Math.max(1, Math.round(scale * 0.7)));
  const wide = spread(heights, Math.max(2, Math.round(scale * 3.2)));
  return (x, y, z, nx, ny) => {
    const u = (x - left) * scale;
    const v = (y - low) * scale;
    const [outU, outV] = [u + nx * 4 * scale, v + ny * 4 * scale];
    const last = ROOM_SIZE - 1;
    if (u < 0 || v < 0 || u >= last || v >= last || outU < 0 || outV < 0 || outU >= last || outV >= last) return 1;
    const crowd = Math.max(0, (bilinear(close, u, v) - z - 1000) / 1.6) * 0.5;
    const wall = Math.max(0, (bilinear(wide, outU, outV) - z - 1000) / 6) * 0.9;
    return 1 / (1 + Math.min(2.2, crowd + wall * 1.4));
  };
}

function bilinear(map: Float32Array, u: number, v: number): number {
  const [column, row] = [Math.floor(u), Math.floor(v)];
  const [fu, fv, index] = [u - column, v - row, row * ROOM_SIZE + column];
  const upper = real(map, index) * (1 - fu) + real(map, index + 1) * fu;
  const lower = real(map, index + ROOM_SIZE) * (1 - fu) + real(map, index + ROOM_SIZE + 1) * fu;
  return upper * (1 - fv) + lower * fv;
}

/** Box blur, twice each way, so that it looks like a soft one. */
function spread(source: Float32Array, radius: number): Float32Array {
  let map = source;
  for (let pass = 0; pass < 2; pass++) {
    map = averaged(map, radius, 1, ROOM_SIZE);
    map = averaged(map, radius, ROOM_SIZE, 1);
  }
  return map;
}

function averaged(map: Float32Array, radius: number, step: number, lineStep: number): Float32Array {
  const result = new Float32Array(map.length);
  const last = ROOM_SIZE - 1;
  for (let line = 0; line < ROOM_SIZE; line++) {
    const read = (index: number) => real(map, line * lineStep + Math.min(last, Math.max(0, index)) * step);
    let sum = 0;
    for (let index = -radius; index <= radius; index++) sum += read(index);
    for (let index = 0; index <= last; index++) {
      result[line * lineStep + index * step] = sum / (2 * radius + 1);
      sum += read(index + radius + 1) - read(index - radius);
    }
  }
  return result;
}
