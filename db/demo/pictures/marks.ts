import { stripe } from './loft';
import { joined, type Mesh, type Vec3 } from './mesh';
import type { Point } from './outline';
import { moved } from './placing';

// Each sign as one pen stroke on a cell 1 wide and 2 high.
const SIGNS: Record<string, readonly Point[]> = {
  '0': [
    [0, 0],
    [1, 0],
    [1, 2],
    [0, 2],
    [0, 0],
  ],
  '1': [
    [0.3, 1.6],
    [0.6, 2],
    [0.6, 0],
  ],
  '2': [
    [0, 2],
    [1, 2],
    [1, 1],
    [0, 1],
    [0, 0],
    [1, 0],
  ],
  '3': [
    [0, 2],
    [1, 2],
    [1, 1],
    [0.2, 1],
    [1, 1],
    [1, 0],
    [0, 0],
  ],
  '4': [
    [0, 2],
    [0, 1],
    [1, 1],
    [1, 2],
    [1, 0],
  ],
  '5': [
    [1, 2],
    [0, 2],
    [0, 1],
    [1, 1],
    [1, 0],
    [0, 0],
  ],
  '6': [
    [1, 2],
    [0, 2],
    [0, 0],
    [1, 0],
    [1, 1],
    [0, 1],
  ],
  '7': [
    [0, 2],
    [1, 2],
    [0.5, 0],
  ],
  '8': [
    [0, 0],
    [1, 0],
    [1, 2],
    [0, 2],
    [0, 0],
    [0, 1],
    [1, 1],
  ],
  '9': [
    [1, 1],
    [0, 1],
    [0, 2],
    [1, 2],
    [1, 0],
    [0, 0],
  ],
  P: [
    [0, 0],
    [0, 2],
    [1, 2],
    [1, 1],
    [0, 1],
  ],
  '.': [
    [0.4, 0],
    [0.6, 0],
    [0.6, 0.15],
    [0.4, 0.15],
  ],
  '/': [
    [0, 0],
    [1, 2],
  ],
  '-': [
    [0.1, 1],
    [0.9, 1],
  ],
};

/** Figures written flat on z = 0 from the origin along x; `size` is half their height, cm. */
export function written(text: string, size: number, thickness: number, slant = 0.12): Mesh {
  const strokes = [...text].map((sign, index) => {
    const path = (SIGNS[sign] ?? []).map(([x, y]): Vec3 => [(x + y * slant) * size, y * size, 0]);
    return moved(stripe(refined(path), thickness), { x: index * size * 1.65 });
  });
  return joined(...strokes);
}

/** The same line with points between, so that corners keep their width. */
export function refined(path: readonly Vec3[], pieces = 6): Vec3[] {
  return path.flatMap((from, index) => {
    const to = path[index + 1];
    if (!to) return [from];
    return Array.from({ length: pieces }, (_, step): Vec3 => {
      const t = step / pieces;
      return [from[0] + (to[0] - from[0]) * t, from[1] + (to[1] - from[1]) * t, from[2] + (to[2] - from[2]) * t];
    });
  });
}

/** A line drawn along a loop or path at a height, slightly wavering as a hand does. */
export const lineAlong = (points: readonly Point[], z: number, width: number): Mesh =>
  stripe(
    points.map(([x, y], index): Vec3 => [x + Math.sin(index * 1.7) * 0.02, y + Math.cos(index * 2.3) * 0.02, z]),
    width,
  );
