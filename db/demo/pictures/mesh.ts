export type Vec3 = readonly [number, number, number];

/** Triangles in an object's own space (cm). `edge` is the distance in from the outline, for bursts and wear. */
export type Mesh = { positions: number[]; normals: number[]; edges: number[]; indices: number[] };

export const emptyMesh = (): Mesh => ({ positions: [], normals: [], edges: [], indices: [] });

export function addVertex(mesh: Mesh, position: Vec3, normal: Vec3, edge = 99): number {
  mesh.positions.push(position[0], position[1], position[2]);
  mesh.normals.push(normal[0], normal[1], normal[2]);
  mesh.edges.push(edge);
  return mesh.edges.length - 1;
}

export const subtract = (a: Vec3, b: Vec3): Vec3 => [a[0] - b[0], a[1] - b[1], a[2] - b[2]];

export const cross = (a: Vec3, b: Vec3): Vec3 => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];

export const dot = (a: Vec3, b: Vec3) => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];

export function unit(v: Vec3): Vec3 {
  const length = Math.hypot(v[0], v[1], v[2]) || 1;
  return [v[0] / length, v[1] / length, v[2] / length];
}

export function joined(...meshes: Mesh[]): Mesh {
  const whole = emptyMesh();
  for (const mesh of meshes) {
    const offset = whole.edges.length;
    for (const value of mesh.positions) whole.positions.push(value);
    for (const value of mesh.normals) whole.normals.push(value);
    for (const value of mesh.edges) whole.edges.push(value);
    for (const index of mesh.indices) whole.indices.push(index + offset);
  }
  return whole;
}
