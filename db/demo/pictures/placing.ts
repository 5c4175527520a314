import type { Mesh, Vec3 } from './mesh';

/** Where an object stands: nine turning terms by row, then its place in cm. */
export type Placing = { turn: readonly number[]; move: Vec3 };

export type Pose = { x?: number; y?: number; z?: number; turnX?: number; turnY?: number; turnZ?: number };

const radians = (degrees = 0) => (degrees * Math.PI) / 180;

/** Turns about x, then y, then z (degrees), then moves (cm). */
export function placed({ x = 0, y = 0, z = 0, turnX, turnY, turnZ }: Pose): Placing {
  const [cx, sx] = [Math.cos(radians(turnX)), Math.sin(radians(turnX))];
  const [cy, sy] = [Math.cos(radians(turnY)), Math.sin(radians(turnY))];
  const [cz, sz] = [Math.cos(radians(turnZ)), Math.sin(radians(turnZ))];
  return {
    turn: [
      cz * cy,
      cz * sy * sx - sz * cx,
      cz * sy * cx + sz * sx,
      sz * cy,
      sz * sy * sx + cz * cx,
      sz * sy * cx - cz * sx,
      -sy,
      cy * sx,
      cy * cx,
    ],
    move: [x, y, z],
  };
}

export function turned({ turn }: Placing, [x, y, z]: Vec3): Vec3 {
  const term = (index: number) => turn[index] ?? 0;
  return [
    term(0) * x + term(1) * y + term(2) * z,
    term(3) * x + term(4) * y + term(5) * z,
    term(6) * x + term(7) * y + term(8) * z,
  ];
}

export function carried(placing: Placing, point: Vec3): Vec3 {
  const [x, y, z] = turned(placing, point);
  return [x + placing.move[0], y + placing.move[1], z + placing.move[2]];
}

/** The placing that first applies `inner`, then `outer`: a part mounted on a larger thing. */
export function within(outer: Placing, inner: Placing): Placing {
  const column = (index: number): Vec3 =>
    turned(outer, [inner.turn[index] ?? 0, inner.turn[index + 3] ?? 0, inner.turn[index + 6] ?? 0]);
  const [a, b, c] = [column(0), column(1), column(2)];
  return { turn: [a[0], b[0], c[0], a[1], b[1], c[1], a[2], b[2], c[2]], move: carried(outer, inner.move) };
}

/** A mesh turned and moved within its own object, for parts that share one material. */
export function moved(mesh: Mesh, pose: Pose): Mesh {
  const placing = placed(pose);
  const each = (values: number[], change: (point: Vec3) => Vec3) =>
    mesh.edges.flatMap((_, index) => [
      ...change([values[index * 3] ?? 0, values[index * 3 + 1] ?? 0, values[index * 3 + 2] ?? 0]),
    ]);
  return {
    ...mesh,
    positions: each(mesh.positions, (point) => carried(placing, point)),
    normals: each(mesh.normals, (normal) => turned(placing, normal)),
  };
}
