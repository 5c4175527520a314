import { real, whole } from './reading';

/** Vertices on a plane: `near` grows towards the viewer; 0 marks a vertex that cannot be drawn. */
export type Projected = { x: Float32Array; y: Float32Array; near: Float32Array };

export type Plane = { width: number; height: number; near: Float32Array; ids?: Int32Array };

/** Draws the wanted triangles into the plane, keeping the nearest at each point. */
export function rasterise(
  projected: Projected,
  triangles: Int32Array,
  plane: Plane,
  wanted: (triangle: number) => boolean,
) {
  for (let triangle = 0; triangle * 3 < triangles.length; triangle++)
    if (wanted(triangle)) drawTriangle(projected, triangles, triangle, plane);
}

function drawTriangle({ x, y, near }: Projected, triangles: Int32Array, triangle: number, plane: Plane) {
  const a = whole(triangles, triangle * 3);
  const b = whole(triangles, triangle * 3 + 1);
  const c = whole(triangles, triangle * 3 + 2);
  const ax = real(x, a);
  const ay = real(y, a);
  const az = real(near, a);
  const bx = real(x, b);
  const by = real(y, b);
  const bz = real(near, b);
  const cx = real(x, c);
  const cy = real(y, c);
  const cz = real(near, c);
  if (az === 0 || bz === 0 || cz === 0) return;
  const area = (bx - ax) * (cy - ay) - (cx - ax) * (by - ay);
  if (Math.abs(area) < 1e-9) return;
  if ((ax < 0 && bx < 0 && cx < 0) || (ax > plane.width && bx > plane.width && cx > plane.width)) return;
  const top = Math.max(0, Math.ceil(Math.min(ay, by, cy)));
  const bottom = Math.min(plane.height - 1, Math.floor(Math.max(ay, by, cy)));
  const slopeX = ((bz - az) * (cy - ay) - (cz - az) * (by - ay)) / area;
  const slopeY = ((cz - az) * (bx - ax) - (bz - az) * (cx - ax)) / area;
  for (let row = top; row <= bottom; row++) {
    const one = crossing(ax, ay, bx, by, row);
    const two = crossing(bx, by, cx, cy, row);
    const three = crossing(cx, cy, ax, ay, row);
    const from = Math.max(0, Math.ceil(Math.min(one, two, three)));
    const to = Math.min(plane.width - 1, Math.floor(farthest(one, two, three)));
    fillRow(plane, triangle, row * plane.width, from, to, az + (row - ay) * slopeY - ax * slopeX, slopeX);
  }
}

/** Where an edge meets a row, or Infinity where it does not. */
function crossing(ax: number, ay: number, bx: number, by: number, row: number): number {
  if ((ay < row && by < row) || (ay > row && by > row)) return Infinity;
  return ay === by ? ax : ax + ((row - ay) / (by - ay)) * (bx - ax);
}

function farthest(one: number, two: number, three: number): number {
  let most = -Infinity;
  if (one !== Infinity) most = one;
  if (two !== Infinity && two > most) most = two;
  if (three !== Infinity && three > most) most = three;
  return most;
}

function fillRow(plane: Plane, triangle: number, start: number, from: number, to: number, base: number, slope: number) {
  const { near, ids } = plane;
  for (let column = from; column <= to; column++) {
    const value = base + column * slope;
    if (value <= real(near, start + column)) continue;
    near[start + column] = value;
    if (ids) ids[start + column] = triangle;
  }
}
