import type { Material } from './material';
import type { Mesh, Vec3 } from './mesh';
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

/** Everything in front of the camera, as one list of triangles in world space (cm, z up). */
export class Scene {
  private readonly world: number[] = [];
  private readonly local: number[] = [];
  private readonly normals: number[] = [];
  private readonly edges: number[] = [];
  private readonly triangles: number[] = [];
  private readonly surfaces: number[] = [];
  private readonly casts: number[] = [];
  private readonly materials: Material[] = [];

  /** `casts` is false for the ground, which would only shadow itself. */
  add(mesh: Mesh, material: Material, placing: Placing, casts = material.layer === 'solid') {
    const offset = this.edges.length;
    appendTurned(this.world, mesh.positions, placing.turn, placing.move);
    appendTurned(this.normals, mesh.normals, placing.turn, [0, 0, 0]);
    for (const value of mesh.positions) this.local.push(value);
    for (const value of mesh.edges) this.edges.push(value);
    for (const index of mesh.indices) this.triangles.push(index + offset);
    const surface = this.surfaceOf(material);
    for (let index = 0; index < mesh.indices.length; index += 3) {
      this.surfaces.push(surface);
      this.casts.push(casts ? 1 : 0);
    }
  }

  packed(): Packed {
    return {
      world: new Float32Array(this.world),
      local: new Float32Array(this.local),
      normals: new Float32Array(this.normals),
      edges: new Float32Array(this.edges),
      triangles: new Int32Array(this.triangles),
      surfaces: new Int32Array(this.surfaces),
      casts: new Uint8Array(this.casts),
      materials: this.materials,
    };
  }

  private surfaceOf(material: Material): number {
    const known = this.materials.indexOf(material);
    return known >= 0 ? known : this.materials.push(material) - 1;
  }
}

function appendTurned(into: number[], values: readonly number[], turn: readonly number[], [mx, my, mz]: Vec3) {
  const [a = 1, b = 0, c = 0, d = 0, e = 1, f = 0, g = 0, h = 0, i = 1] = turn;
  for (let index = 0; index < values.length; index += 3) {
    const x = at(values, index);
    const y = at(values, index + 1);
    const z = at(values, index + 2);
    into.push(a * x + b * y + c * z + mx, d * x + e * y + f * z + my, g * x + h * y + i * z + mz);
  }
}
