export type Grain = 'radial' | 'tangential';

/** Whether a figure was read in its publication or recalled; recalled ones are shown as approximate. */
export type Provenance = 'seen' | 'memory';

export type GrainMovement = {
  /** Change per point of moisture as a share of the width, 6 to 14 %. */
  coefficientPerPercent: number | null;
  /** From green to oven-dry, percent of the green width. */
  shrinkagePercent: number | null;
};

/** How a wood moves: `radial` across quarter-sawn width, `tangential` across flat-sawn width. */
export type Movement = {
  radial: GrainMovement;
  tangential: GrainMovement;
  coefficientProvenance: Provenance;
  shrinkageProvenance: Provenance;
};

export type Material = {
  key: string;
  name: string;
  kind: 'wood' | 'skin' | 'shell' | 'other';
  /** Errs on the side of asking: the shop must ask its authority, whose lists change. */
  papersMayBeNeeded: boolean;
  movement: Movement | null;
};

const both = (radial: number | null, tangential: number | null) => ({ radial, tangential });

/** Coefficients and shrinkages as [radial, tangential]. */
function movement(
  coefficients: { radial: number | null; tangential: number | null },
  shrinkages: { radial: number | null; tangential: number | null },
  coefficientProvenance: Provenance,
  shrinkageProvenance: Provenance = 'memory',
): Movement {
  const along = (grain: Grain) => ({
    coefficientPerPercent: coefficients[grain],
    shrinkagePercent: shrinkages[grain],
  });
  return {
    radial: along('radial'),
    tangential: along('tangential'),
    coefficientProvenance,
    shrinkageProvenance,
  };
}

const wood = (key: string, name: string, papersMayBeNeeded: boolean, moves: Movement | null = null): Material => ({
  key,
  name,
  kind: 'wood',
  papersMayBeNeeded,
  movement: moves,
});

const none = both(null, null);

/**
 * A list to start a shop's own from. Coefficients: USDA Forest Products Laboratory, Wood Handbook, FPL-GTR-190 (2010), Table
 * 13-5; shrinkages: Tables 4-3 and 4-4. Mahogany's, khaya's and limba's coefficients rest on older shrinkages than the tables
 * now give, so the shrinkages are preferred for them. Which materials are marked for papers is our reading of what border
 * authorities commonly ask about (CITES, the Lacey Act, EU rules), from memory: the shop keeps the mark and asks.
 */
export const starterMaterials: readonly Material[] = [
  wood('sugar_maple', 'Sugar (hard) maple', false, movement(both(0.00165, 0.00353), both(4.8, 9.9), 'seen')),
  wood('red_maple', 'Red maple', false, movement(both(0.00137, 0.00289), both(4.0, 8.2), 'seen')),
  wood('bigleaf_maple', 'Bigleaf maple', false, movement(both(0.00126, 0.00248), both(3.7, 7.1), 'seen')),
  wood('black_walnut', 'Black walnut', false, movement(both(0.0019, 0.00274), both(5.5, 7.8), 'seen')),
  wood('white_ash', 'White ash', false, movement(both(0.00169, 0.00274), both(4.9, 7.8), 'seen')),
  wood('green_ash', 'Green ash', false, movement(both(0.00169, 0.00274), none, 'seen')),
  wood('red_alder', 'Red alder', false, movement(both(0.00151, 0.00256), both(4.4, 7.3), 'seen')),
  wood('american_basswood', 'American basswood', false, movement(both(0.0023, 0.0033), both(6.6, 9.3), 'seen')),
  wood('black_cherry', 'Black cherry', false, movement(both(0.00126, 0.00248), both(3.7, 7.1), 'seen')),
  wood('mahogany', 'Mahogany (Swietenia)', true, movement(both(0.00172, 0.00238), both(3.0, 4.1), 'memory', 'seen')),
  wood('khaya', 'Khaya (African mahogany)', true, movement(both(0.00141, 0.00201), both(2.5, 4.5), 'memory', 'seen')),
  wood('limba', 'Limba', false, movement(both(0.00151, 0.00187), both(4.5, 6.2), 'memory', 'seen')),
  wood('spanish_cedar', 'Spanish-cedar', true, movement(both(0.00141, 0.00219), none, 'memory')),
  wood('sapele', 'Sapele', false),
  wood('sitka_spruce', 'Sitka spruce', false),
  wood('indian_rosewood', 'Indian rosewood', true),
  wood('brazilian_rosewood', 'Brazilian rosewood', true),
  wood('cocobolo', 'Cocobolo', true),
  wood('ebony', 'Ebony', true),
  wood('pau_ferro', 'Pau ferro', false),
  wood('wenge', 'Wenge', false),
  wood('bubinga', 'Bubinga', true),
  { key: 'mother_of_pearl', name: 'Mother-of-pearl', kind: 'shell', papersMayBeNeeded: true, movement: null },
  { key: 'abalone', name: 'Abalone', kind: 'shell', papersMayBeNeeded: true, movement: null },
  { key: 'ray_skin', name: 'Ray skin', kind: 'skin', papersMayBeNeeded: true, movement: null },
  { key: 'snake_skin', name: 'Snake skin', kind: 'skin', papersMayBeNeeded: true, movement: null },
  { key: 'cow_leather', name: 'Cow leather', kind: 'skin', papersMayBeNeeded: false, movement: null },
  { key: 'bone', name: 'Bone', kind: 'other', papersMayBeNeeded: true, movement: null },
];

type MaterialRow = Omit<Material, 'movement'> & {
  radialCoefficient: number | null;
  tangentialCoefficient: number | null;
};

/** The list as rows of the `materials` table. */
export const materialRows = (): MaterialRow[] =>
  starterMaterials.map(({ movement: moves, ...material }) => ({
    ...material,
    radialCoefficient: moves?.radial.coefficientPerPercent ?? null,
    tangentialCoefficient: moves?.tangential.coefficientPerPercent ?? null,
  }));

/**
 * How a material of the shop's table moves. A row that still holds the starting figures keeps their source and shrinkages; one
 * the shop has changed rests on the shop's word and is shown as approximate. Null where nothing is known.
 */
export function movementOf(
  row: Pick<MaterialRow, 'key' | 'radialCoefficient' | 'tangentialCoefficient'>,
): Movement | null {
  const starter = starterMaterials.find((material) => material.key === row.key)?.movement ?? null;
  const isUntouched =
    row.radialCoefficient === (starter?.radial.coefficientPerPercent ?? null) &&
    row.tangentialCoefficient === (starter?.tangential.coefficientPerPercent ?? null);
  if (isUntouched) return starter;
  return movement(both(row.radialCoefficient, row.tangentialCoefficient), none, 'memory');
}

/** Said beside every material that is marked. The mark says nothing about materials that are not. */
export const PAPERS_SENTENCE =
  'Papers may be needed to take this across a border. The shop asks its authority before it buys or ships, and holds the documents.';
