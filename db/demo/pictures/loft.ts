import { addVertex, cross, emptyMesh, type Mesh, subtract, unit, type Vec3 } from './mesh';
import { circle, type Point } from './outline';

/** A skin over rings that all have the same number of points; `closed` joins each ring's ends. Ends are capped. */
export function loft(rings: readonly (readonly Vec3[])[], closed = true): Mesh {
  const mesh = emptyMesh();
  const count = rings[0]?.length ?? 0;
  const ringAt = (row: number) => rings[Math.min(rings.length - 1, Math.max(0, row))] ?? [];
  const spot = (row: number, index: number): Vec3 => {
    const wrapped = closed ? (index + count) % count : Math.min(count - 1, Math.max(0, index));
    return ringAt(row)[wrapped] ?? [0, 0, 0];
  };
  rings.forEach((ring, row) =>
    ring.forEach((point, index) => {
      const across = subtract(spot(row, index + 1), spot(row, index - 1));
      const along = subtract(spot(row + 1, index), spot(row - 1, index));
      addVertex(mesh, point, unit(cross(across, along)));
    }),
  );
  for (let row = 0; row + 1 < rings.length; row++)
    for (let index = 0; index < (closed ? count : count - 1); index++) {
      const a = row * count + index;
      const b = row * count + ((index + 1) % count);
      mesh.indices.push(a, b, b + count, a, b + count, a + count);
    }
  if (closed) for (const ring of [ringAt(0), ringAt(rings.length - 1)]) addCap(mesh, ring);
  return mesh;
}

function addCap(mesh: Mesh, ring: readonly Vec3[]) {
  const [first, second, third] = [ring[0], ring[Math.floor(ring.length / 3)], ring[Math.floor((2 * ring.length) / 3)]];
  if (!first || !second || !third) return;
  const normal = unit(cross(subtract(second, first), subtract(third, first)));
  const sum = ring.reduce<Vec3>((a, b) => [a[0] + b[0], a[1] + b[1], a[2] + b[2]], [0, 0, 0]);
  const centre = addVertex(mesh, [sum[0] / ring.length, sum[1] / ring.length, sum[2] / ring.length], normal);
  const start = mesh.edges.length;
  for (const point of ring) addVertex(mesh, point, normal);
  ring.forEach((_, index) => mesh.indices.push(centre, start + index, start + ((index + 1) % ring.length)));
}

/** A wire or pipe along a path. */
export function tube(path: readonly Vec3[], radius: number | ((t: number) => number), sides = 8): Mesh {
  const last = path.length - 1;
  const rings = path.map((centre, index) => {
    const forward = unit(subtract(path[Math.min(last, index + 1)] ?? centre, path[Math.max(0, index - 1)] ?? centre));
    const side = unit(cross(forward, Math.abs(forward[2]) > 0.9 ? [1, 0, 0] : [0, 0, 1]));
    const up = cross(side, forward);
    const r = typeof radius === 'number' ? radius : radius(index / last);
    return circle(r, sides).map(([a, b]): Vec3 => [
      centre[0] + side[0] * a + up[0] * b,
      centre[1] + side[1] * a + up[1] * b,
      centre[2] + side[2] * a + up[2] * b,
    ]);
  });
  return loft(rings);
}

/** A turned thing standing on z: pairs of radius and height from the foot up. */
export const turning = (profile: readonly Point[], sides = 24): Mesh =>
  loft(profile.map(([radius, z]) => circle(Math.max(radius, 0.001), sides).map(([x, y]): Vec3 => [x, y, z])));

/** A flat stripe of the given width along a path that lies on a surface. */
export function stripe(path: readonly Vec3[], width: number): Mesh {
  const last = path.length - 1;
  const side = (index: number): Vec3 => {
    const from = path[Math.max(0, index - 1)] ?? [0, 0, 0];
    const to = path[Math.min(last, index + 1)] ?? [1, 0, 0];
    return unit([from[1] - to[1], to[0] - from[0], 0]);
  };
  const edge = (sign: number) =>
    path.map(([x, y, z], index): Vec3 => {
      const [sx, sy] = side(index);
      return [x + (sign * sx * width) / 2, y + (sign * sy * width) / 2, z];
    });
  const mesh = loft([edge(1), edge(-1)], false);
  mesh.normals = mesh.normals.map((_, index) => (index % 3 === 2 ? 1 : 0));
  mesh.edges = mesh.edges.map((_, index) => (index > last ? width : 0));
  return mesh;
}
