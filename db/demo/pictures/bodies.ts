import { type Mesh } from './mesh';
import { type Point, roundedRect, shifted, smoothLoop } from './outline';
import { slab } from './slab';

export type BodyKind = 'solid' | 'hollow' | 'bass';

/** Thickness of a body, cm, with its back on z = 0. */
export const BODY_TOP = 4.4;

// The shop's own outlines, in cm: the neck points along +x, the bass side lies towards +y.
const CONTROL: Record<BodyKind, readonly Point[]> = {
  solid: [
    [-19.6, 0],
    [-21.4, 6.5],
    [-18.6, 12.8],
    [-12, 15.8],
    [-4.5, 14.2],
    [2.5, 11],
    [9.5, 11.2],
    [16.2, 12.6],
    [20.6, 10.4],
    [19.6, 6.4],
    [15.6, 4],
    [13.6, 2.9],
    [13.6, -2.9],
    [14.8, -4.6],
    [17.6, -7],
    [18.2, -10.4],
    [14.6, -12.3],
    [8.6, -11],
    [2.2, -10.6],
    [-4.8, -13.6],
    [-12.4, -15.4],
    [-18.8, -12.4],
    [-21.3, -6.3],
  ],
  hollow: [
    [-22.6, 0],
    [-22, 8.4],
    [-17.6, 16],
    [-8.8, 18.8],
    [0.4, 16.8],
    [7, 14],
    [12.4, 13.4],
    [17, 10.6],
    [18.4, 6],
    [17.2, 2.9],
    [17.2, -2.9],
    [14.2, -5.2],
    [13.2, -8.6],
    [14.6, -12.4],
    [11.4, -15],
    [5, -14],
    [-2, -16.2],
    [-9.4, -18.4],
    [-17.8, -15.8],
    [-22, -8.2],
  ],
  bass: [
    [-19, 0],
    [-21.2, 6.4],
    [-18, 12.6],
    [-10.6, 14.2],
    [-2.6, 11.8],
    [5.5, 9.6],
    [14, 11],
    [21.5, 13.9],
    [27, 15],
    [28.8, 12.8],
    [24, 9],
    [17.5, 5.8],
    [13.4, 2.9],
    [13.4, -2.9],
    [15.4, -5.4],
    [18.2, -9],
    [18, -12.8],
    [13.2, -13.4],
    [6, -11],
    [-2.5, -12],
    [-11, -14.8],
    [-18.2, -13],
    [-21.6, -6.8],
  ],
};

export const bodyOutline = (kind: BodyKind): Point[] => smoothLoop(CONTROL[kind], 9);

/** Leaf-like openings of a hollow body: a bent seed with a waist. */
export function soundHoles(): Point[][] {
  const leaf: Point[] = smoothLoop(
    [
      [-7.4, 0.3],
      [-6.4, -1.2],
      [-3.6, -1.3],
      [0, -0.3],
      [3.4, -0.6],
      [5.8, -0.5],
      [7, 0.9],
      [5.4, 1.5],
      [3, 0.9],
      [0, 0.75],
      [-3.8, 0.5],
      [-6, 1.4],
    ],
    6,
  );
  const lower = leaf.map(([x, y]): Point => [x, -y]);
  return [shifted(leaf, -6, 10.4, 6), shifted(lower, -6, -10.2, -6)];
}

const isHeld = (kind: BodyKind) => kind === 'hollow';

/** Runs out through the end of the body, where its wall is left open. */
export const NECK_POCKET: readonly Point[] = [
  [13.66, -2.85],
  [13.66, 2.85],
  [5.5, 2.85],
  [5.05, 2.65],
  [4.9, 2.2],
  [4.9, -2.2],
  [5.05, -2.65],
  [5.5, -2.85],
];
export const PICKUP_HOLES = [shifted(roundedRect(3.8, 9, 0.5), 1.2, 0), shifted(roundedRect(3.8, 9, 0.5), -6.4, 0)];
/** Where the two shafts of the controls come through the top. */
export const controlSpots = (kind: BodyKind): readonly Point[] =>
  kind === 'hollow'
    ? [
        [-16.4, -9.6],
        [-18.4, -5.4],
      ]
    : [
        [-9.2, -9.8],
        [-13.2, -7.4],
      ];
export const CONTROL_CAVITY = smoothLoop(
  [
    [-16, -6],
    [-15.6, -9.6],
    [-11, -11.8],
    [-5.6, -10.6],
    [-5, -7.4],
    [-9, -5.2],
  ],
  7,
);

export type BodyCuts = { pocket?: boolean; pickups?: boolean };

/** The carved swell of a top: rises from the rim and levels out in the middle. */
export const archOf = (kind: BodyKind, height: number) => (depth: number) => {
  const reach = kind === 'hollow' ? 11 : 7;
  const t = Math.min(1, Math.max(0, depth / reach));
  return height * t * t * (3 - 2 * t);
};

const made = new Map<string, Mesh[]>();

/** A whole body, with what the router has taken out of it; made once for each shape. */
export function bodyMeshes(kind: BodyKind, cuts: BodyCuts, height = 0): Mesh[] {
  const name = `${kind} ${cuts.pocket === true} ${cuts.pickups === true} ${height}`;
  const meshes = made.get(name) ?? makeBody(kind, cuts, height);
  made.set(name, meshes);
  return meshes;
}

function makeBody(kind: BodyKind, cuts: BodyCuts, height: number): Mesh[] {
  const outline = bodyOutline(kind);
  const holes = [
    ...(cuts.pocket ? [NECK_POCKET] : []),
    ...(cuts.pickups ? PICKUP_HOLES : []),
    ...(isHeld(kind) ? soundHoles() : []),
  ];
  const floor = 2.2;
  const lower = slab({ outline, bottom: 0, top: floor, round: 0.25, cell: 2 });
  const arch = height > 0 ? { arch: archOf(kind, height) } : {};
  const upper = slab({ outline, holes, bottom: floor - 0.3, top: BODY_TOP, round: 0.9, cell: 0.4, ...arch });
  return [lower, upper];
}

/** The shop's headstock: a leaf that opens into two uneven points. Nut at x = 0. */
export const headOutline = (): Point[] =>
  smoothLoop(
    [
      [0, -2.1],
      [2.2, -2.3],
      [4.6, -3.6],
      [8.5, -4.1],
      [13, -3.6],
      [16.6, -3.9],
      [17.4, -2.9],
      [15.9, -0.6],
      [16.4, 1],
      [19.4, 3.4],
      [18.8, 4.5],
      [14, 3.9],
      [8.5, 4.2],
      [4.6, 3.6],
      [2.2, 2.3],
      [0, 2.1],
    ],
    6,
  );

export const TUNERS: readonly Point[] = [
  [5.4, 2.5],
  [9.4, 2.8],
  [13.4, 2.6],
  [5.4, -2.5],
  [9.4, -2.8],
  [13.4, -2.5],
];
