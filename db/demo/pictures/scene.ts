import type { Material } from './material';
import type { Mesh } from './mesh';
import type { Placing } from './placing';
import { at } from './reading';

export type Packed = {
  world: Float32Array;
  local: Float32Array;
  normals: Float32Array;
  edges: Float32Array;
  triangles: Int32Array;
  surfaces: Int32Array;
  casts: Uint8Array;
  materials: readonly Material[];
};

type Part = { mesh: Mesh; material: Material; placing: Placing; casts: boolean };

/** Everything in front of the camera, in world space (cm, z up). */
export class Scene {
  private readonly parts: Part[] = [];

  /** `casts` is false for the ground, which would only shadow itself. */
  add(mesh: Mesh, material: Material, placing: Placing, casts = material.layer === 'solid') {
    this.parts.push({ mesh, material, placing, casts });
  }

  /** One list of triangles, sized once: growing lists took longer than lighting a small picture. */
  packed(): Packed {
    const vertices = this.parts.reduce((sum, { mesh }) => sum + mesh.edges.length, 0);
    const corners = this.parts.reduce((sum, { mesh }) => sum + mesh.indices.length, 0);
    const materials = [...new Set(this.parts.map(({ material }) => material))];
    const packed: Packed = {
      world: new Float32Array(vertices * 3),
      local: new Float32Array(vertices * 3),
      normals: new Float32Array(vertices * 3),
      edges: new Float32Array(vertices),
      triangles: new Int32Array(corners),
      surfaces: new Int32Array(corners / 3),
      casts: new Uint8Array(corners / 3),
      materials,
    };
    let vertex = 0;
    let corner = 0;
    for (const part of this.parts) {
      packPart(packed, part, vertex, corner);
      vertex += part.mesh.edges.length;
      corner += part.mesh.indices.length;
    }
    return packed;
  }
}

function packPart(packed: Packed, { mesh, material, placing, casts }: Part, vertex: number, corner: number) {
  packed.local.set(mesh.positions, vertex * 3);
  packed.edges.set(mesh.edges, vertex);
  writeTurned(packed.world, vertex * 3, mesh.positions, placing, 1);
  writeTurned(packed.normals, vertex * 3, mesh.normals, placing, 0);
  for (let index = 0; index < mesh.indices.length; index++)
    packed.triangles[corner + index] = at(mesh.indices, index) + vertex;
  const [first, last] = [corner / 3, (corner + mesh.indices.length) / 3];
  packed.surfaces.fill(packed.materials.indexOf(material), first, last);
  packed.casts.fill(casts ? 1 : 0, first, last);
}

/** Turned, and moved as well when `share` is 1 (a normal is not moved). */
function writeTurned(into: Float32Array, start: number, values: readonly number[], placing: Placing, share: 0 | 1) {
  const [a = 1, b = 0, c = 0, d = 0, e = 1, f = 0, g = 0, h = 0, i = 1] = placing.turn;
  const [mx, my, mz] = placing.move;
  for (let index = 0; index < values.length; index += 3) {
    const x = at(values, index);
    const y = at(values, index + 1);
    const z = at(values, index + 2);
    into[start + index] = a * x + b * y + c * z + mx * share;
    into[start + index + 1] = d * x + e * y + f * z + my * share;
    into[start + index + 2] = g * x + h * y + i * z + mz * share;
  }
}
