import { cross, dot, subtract, unit, type Vec3 } from './mesh';
import type { Projected } from './raster';
import { real } from './reading';

export type Camera = {
  eye: Vec3;
  target: Vec3;
  /** Angle of view across the longer side, degrees. */
  view: number;
  /** Degrees the camera is tilted, as a hand-held phone is. */
  roll?: number;
  /** Distance in focus, cm; the target when left out. */
  focus?: number;
  /** Strength of the blur away from the focus, 0 to about 2. */
  blur?: number;
};

export type Lens = { eye: Vec3; right: Vec3; up: Vec3; forward: Vec3; scale: number; width: number; height: number };

export function lensFor(camera: Camera, width: number, height: number): Lens {
  const forward = unit(subtract(camera.target, camera.eye));
  const level = unit(cross(forward, Math.abs(forward[2]) > 0.999 ? [0, 1, 0] : [0, 0, 1]));
  const upright = cross(level, forward);
  const roll = ((camera.roll ?? 0) * Math.PI) / 180;
  const [c, s] = [Math.cos(roll), Math.sin(roll)];
  const turn = (a: Vec3, b: Vec3, p: number, q: number): Vec3 => [
    a[0] * p + b[0] * q,
    a[1] * p + b[1] * q,
    a[2] * p + b[2] * q,
  ];
  const scale = Math.max(width, height) / 2 / Math.tan((camera.view * Math.PI) / 360);
  return {
    eye: camera.eye,
    right: turn(level, upright, c, s),
    up: turn(upright, level, c, -s),
    forward,
    scale,
    width,
    height,
  };
}

/** Vertices onto the picture, in half-pixels: two rows and columns of points make one pixel. */
export function project(world: Float32Array, lens: Lens): Projected {
  const count = world.length / 3;
  const [x, y, near] = [new Float32Array(count), new Float32Array(count), new Float32Array(count)];
  for (let index = 0; index < count; index++) {
    const from: Vec3 = [
      real(world, index * 3) - lens.eye[0],
      real(world, index * 3 + 1) - lens.eye[1],
      real(world, index * 3 + 2) - lens.eye[2],
    ];
    const distance = dot(from, lens.forward);
    if (distance < 1) continue;
    x[index] = 2 * (lens.width / 2 + (lens.scale * dot(from, lens.right)) / distance) - 0.5;
    y[index] = 2 * (lens.height / 2 - (lens.scale * dot(from, lens.up)) / distance) - 0.5;
    near[index] = 1 / distance;
  }
  return { x, y, near };
}
