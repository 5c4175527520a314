import { addVertex, emptyMesh, type Mesh, unit } from './mesh';
import { anticlockwise, depthInside, isConvex, loopNormals, type Point, roundedRect } from './outline';
import { at } from './reading';

export type SlabShape = {
  outline: readonly Point[];
  holes?: readonly (readonly Point[])[];
  bottom: number;
  top: number;
  /** Radius of the rounded top edge, cm. */
  round?: number;
  /** Height above `top` for a carved face, given the distance in from the edge and the place. */
  arch?: (depth: number, x: number, y: number) => number;
  /** Grid of the face, cm. */
  cell?: number;
};

/** A flat thing with an outline: walls, a rounded upper edge and a face that may be carved or pierced. */
export function slab({ outline, holes = [], bottom, top, round = 0, arch, cell = 1.2 }: SlabShape): Mesh {
  const mesh = emptyMesh();
  const rim = anticlockwise(outline);
  addWall(mesh, rim, { bottom, top, round }, (x, y) => holes.some((hole) => depthInside(hole, x, y) > 0));
  for (const hole of holes) {
    const inner = [...anticlockwise(hole)].reverse();
    addWall(mesh, inner, { bottom, top, round: 0 }, (x, y) => depthInside(rim, x, y) < 0);
  }
  if (!arch && holes.length === 0 && isConvex(rim)) addFan(mesh, rim, top, round);
  else addFace(mesh, { outline, holes, bottom, top, round, cell, ...(arch ? { arch } : {}) });
  return mesh;
}

/** A block lying on z = 0 with softened edges (cm). */
export const block = (x: number, y: number, z: number, round = 0.15, corner = round): Mesh =>
  slab({ outline: roundedRect(x, y, Math.max(corner, 0.02)), bottom: 0, top: z, round, cell: Math.max(x, y) / 6 });

type Wall = { bottom: number; top: number; round: number };

/** A wall along a loop, left open where a hole runs out through the side. */
function addWall(
  mesh: Mesh,
  loop: readonly Point[],
  { bottom, top, round }: Wall,
  isOpen: (x: number, y: number) => boolean,
) {
  const normals = loopNormals(loop);
  const steps = round > 0 ? 5 : 0;
  const rows = Array.from({ length: steps + 2 }, (_, row) => {
    const angle = row === 0 || steps === 0 ? 0 : ((row - 1) / steps) * (Math.PI / 2);
    const z = row === 0 ? bottom : top - round + round * Math.sin(angle);
    return { angle, z, inset: round * (1 - Math.cos(angle)) };
  });
  const start = mesh.edges.length;
  for (const { angle, z, inset } of rows)
    loop.forEach(([x, y], index) => {
      const [nx, ny] = normals[index] ?? [1, 0];
      const lean = Math.cos(angle);
      addVertex(mesh, [x - nx * inset, y - ny * inset, z], [nx * lean, ny * lean, Math.sin(angle)], inset);
    });
  const open = loop.map(([x, y], index) => {
    const [nextX, nextY] = loop[(index + 1) % loop.length] ?? [x, y];
    return isOpen((x + nextX) / 2, (y + nextY) / 2);
  });
  stitch(mesh, start, rows.length, open);
}

function stitch(mesh: Mesh, start: number, rows: number, open: readonly boolean[]) {
  const count = open.length;
  for (let row = 0; row + 1 < rows; row++)
    for (let index = 0; index < count; index++) {
      if (open[index]) continue;
      const a = start + row * count + index;
      const b = start + row * count + ((index + 1) % count);
      mesh.indices.push(a, b, b + count, a, b + count, a + count);
    }
}

function addFan(mesh: Mesh, loop: readonly Point[], top: number, round: number) {
  const normals = loopNormals(loop);
  const [sumX, sumY] = loop.reduce(([a, b], [x, y]) => [a + x, b + y], [0, 0]);
  const [x, y] = [sumX / loop.length, sumY / loop.length];
  const middle = addVertex(mesh, [x, y, top], [0, 0, 1], depthInside(loop, x, y));
  loop.forEach(([px, py], index) => {
    const [nx, ny] = normals[index] ?? [0, 0];
    addVertex(mesh, [px - nx * round, py - ny * round, top], [0, 0, 1], round);
    mesh.indices.push(middle, middle + 1 + index, middle + 1 + ((index + 1) % loop.length));
  });
}

type Corner = { x: number; y: number; z: number; nx: number; ny: number; clip: number; edge: number };

function addFace(mesh: Mesh, shape: SlabShape & { cell: number; round: number }) {
  const { columns, rows, corners } = faceGrid(shape);
  for (let row = 0; row < rows; row++)
    for (let column = 0; column < columns; column++) {
      const [a, b] = [corners[row * (columns + 1) + column], corners[row * (columns + 1) + column + 1]];
      const [d, c] = [corners[(row + 1) * (columns + 1) + column], corners[(row + 1) * (columns + 1) + column + 1]];
      if (!a || !b || !c || !d) continue;
      addClipped(mesh, [a, b, c]);
      addClipped(mesh, [a, c, d]);
    }
}

function faceGrid({ outline, holes = [], top, arch, cell, round }: SlabShape & { cell: number; round: number }) {
  const xs = outline.map(([x]) => x);
  const ys = outline.map(([, y]) => y);
  const [left, low] = [Math.min(...xs), Math.min(...ys)];
  const columns = Math.max(2, Math.ceil((Math.max(...xs) - left) / cell));
  const rows = Math.max(2, Math.ceil((Math.max(...ys) - low) / cell));
  const [dx, dy] = [(Math.max(...xs) - left) / columns, (Math.max(...ys) - low) / rows];
  const corners: Corner[] = [];
  for (let row = 0; row <= rows; row++)
    for (let column = 0; column <= columns; column++) {
      const [x, y] = [left + column * dx, low + row * dy];
      const edge = depthInside(outline, x, y);
      const clip = holes.reduce((least, hole) => Math.min(least, -depthInside(hole, x, y)), edge - round * 0.96);
      corners.push({ x, y, z: top + (arch ? arch(edge, x, y) : 0), nx: 0, ny: 0, clip, edge });
    }
  if (arch) {
    for (let pass = 0; pass < 10; pass++) settle(corners, columns, round + cell);
    lean(corners, columns, rows, dx, dy);
  }
  return { columns, rows, corners };
}

/** Evens out the ridges that a distance field has where two edges are equally far. */
function settle(corners: Corner[], columns: number, margin: number) {
  const stride = columns + 1;
  const heights = corners.map(({ z }) => z);
  corners.forEach((corner, index) => {
    if (corner.edge < margin) return;
    const around = [index - 1, index + 1, index - stride, index + stride];
    corner.z = around.reduce((sum, near) => sum + (heights[near] ?? corner.z), corner.z) / 5;
  });
}

function lean(corners: Corner[], columns: number, rows: number, dx: number, dy: number) {
  const height = (row: number, column: number) => corners[row * (columns + 1) + column]?.z ?? 0;
  corners.forEach((corner, index) => {
    const row = Math.floor(index / (columns + 1));
    const column = index % (columns + 1);
    const [left, right] = [Math.max(0, column - 1), Math.min(columns, column + 1)];
    const [low, high] = [Math.max(0, row - 1), Math.min(rows, row + 1)];
    corner.nx = -(height(row, right) - height(row, left)) / ((right - left) * dx);
    corner.ny = -(height(high, column) - height(low, column)) / ((high - low) * dy);
  });
}

function addClipped(mesh: Mesh, triangle: readonly Corner[]) {
  const kept: Corner[] = [];
  triangle.forEach((from, index) => {
    const to = triangle[(index + 1) % triangle.length] ?? from;
    if (from.clip >= 0) kept.push(from);
    if (from.clip >= 0 !== to.clip >= 0) kept.push(mixed(from, to, from.clip / (from.clip - to.clip)));
  });
  const indices = kept.map(({ x, y, z, nx, ny, edge }) => addVertex(mesh, [x, y, z], unit([nx, ny, 1]), edge));
  for (let index = 2; index < indices.length; index++)
    mesh.indices.push(at(indices, 0), at(indices, index - 1), at(indices, index));
}

function mixed(from: Corner, to: Corner, t: number): Corner {
  const part = (key: keyof Corner) => from[key] + (to[key] - from[key]) * t;
  return { x: part('x'), y: part('y'), z: part('z'), nx: part('nx'), ny: part('ny'), clip: 0, edge: part('edge') };
}
