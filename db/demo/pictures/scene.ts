import type { Material } from './material';
import type { Mesh, Vec3 } from './mesh';
import { carried, type Placing, turned } from './placing';
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
    for (let index = 0; index < mesh.edges.length; index++) {
      const read = (values: number[]): Vec3 => [
        at(values, index * 3),
        at(values, index * 3 + 1),
        at(values, index * 3 + 2),
      ];
      const point = read(mesh.positions);
      this.world.push(...carried(placing, point));
      this.local.push(...point);
      this.normals.push(...turned(placing, read(mesh.normals)));
      this.edges.push(at(mesh.edges, index));
    }
    for (const index of mesh.indices) this.triangles.push(index + offset);
    const surface = this.surfaceOf(material);
    for (let index = 0; index < mesh.indices.length; index += 3) {
      this.surfaces.push(surface);
      this.casts.push(casts ? 1 : 0);
    }
  }

  packed(): Packed {
    return {
      world: Float32Array.from(this.world),
      local: Float32Array.from(this.local),
      normals: Float32Array.from(this.normals),
      edges: Float32Array.from(this.edges),
      triangles: Int32Array.from(this.triangles),
      surfaces: Int32Array.from(this.surfaces),
      casts: Uint8Array.from(this.casts),
      materials: this.materials,
    };
  }

  private surfaceOf(material: Material): number {
    const known = this.materials.indexOf(material);
    return known >= 0 ? known : this.materials.push(material) - 1;
  }
}
