import { linear, type Rgb, type Sample } from './material';
import { cloud, noise3, smooth } from './noise';

export type WoodTone = 'maple' | 'mahogany' | 'ash' | 'walnut';
export type Species = WoodTone | 'rosewood' | 'ebony' | 'spruce';

export type Figure = 'plain' | 'flame' | 'quilt';

export type Cut = {
  species: Species;
  figure?: Figure;
  /** Moves the board to another place in the tree, so that no two look alike. */
  offset?: number;
  /** Halves mirrored about y = 0, as two leaves of one flitch. */
  bookmatched?: boolean;
};

type Look = {
  early: Rgb;
  late: Rgb;
  pore: Rgb;
  /** Growth rings in a cm. */
  rings: number;
  /** How strongly rings, fibres and pores show, 0 to 1. */
  contrast: number;
  fibre: number;
  pores: number;
};

const look = (early: string, late: string, pore: string, rest: [number, number, number, number]): Look => ({
  early: linear(early),
  late: linear(late),
  pore: linear(pore),
  rings: rest[0],
  contrast: rest[1],
  fibre: rest[2],
  pores: rest[3],
});

const LOOKS: Record<Species, Look> = {
  maple: look('#e3c498', '#c0905a', '#a87a4c', [1.1, 0.32, 0.3, 0.06]),
  mahogany: look('#99603f', '#77452c', '#3b2014', [0.9, 0.45, 0.5, 0.75]),
  ash: look('#dfc39a', '#a87d4e', '#8a6038', [1.5, 0.85, 0.4, 0.5]),
  walnut: look('#83593b', '#4c2f1d', '#24140b', [1, 0.8, 0.55, 0.6]),
  rosewood: look('#5a3426', '#2b1510', '#150a07', [1.7, 0.85, 0.7, 0.6]),
  ebony: look('#2c2320', '#17110f', '#0c0908', [1.2, 0.6, 0.5, 0.3]),
  spruce: look('#e8cf9f', '#c89a5e', '#b98b52', [4, 0.6, 0.25, 0]),
};

/** Paints solid wood whose grain runs along the object's x (cm); the cut end shows its rings. */
export function paintWood(sample: Sample, { species, figure = 'plain', offset = 0, bookmatched = false }: Cut) {
  const { early, late, pore, rings, contrast, fibre, pores } = LOOKS[species];
  const x = sample.x + offset * 37;
  const y = bookmatched ? Math.abs(sample.y) : sample.y;
  const z = sample.z;
  const ring = ringShare(x, y + offset * 3.1, z, rings);
  const fine = Math.min(1, 0.025 / sample.footprint);
  const streak =
    noise3(x * 0.5, y * 9, z * 9 + offset) * 0.6 + noise3(x * 1.3, y * 31, z * 31) * 0.4 * fine + 0.2 * (1 - fine);
  const broad = noise3(x * 0.05, y * 0.4, z * 0.4 + offset);
  const mixture = Math.min(1, Math.max(0, ring * contrast + (streak - 0.5) * fibre * 1.5 + (broad - 0.5) * 0.7));
  const light = 0.8 + 0.4 * broad + (streak - 0.5) * fibre * 0.45;
  sample.r = (early[0] + (late[0] - early[0]) * mixture) * light;
  sample.g = (early[1] + (late[1] - early[1]) * mixture) * light;
  sample.b = (early[2] + (late[2] - early[2]) * mixture) * light;
  if (pores > 0) addPores(sample, x, y, z, pore, pores * fine * (0.4 + 0.6 * ring));
  const shimmer = figureShare(figure, x, y, z);
  sample.r *= shimmer;
  sample.g *= shimmer ** 1.12;
  sample.b *= shimmer ** 1.25;
  sample.rough = 0.62;
  sample.bumpY += (streak - 0.5) * 0.1;
}

function ringShare(x: number, y: number, z: number, rings: number): number {
  const sway = (noise3(x * 0.045, y * 0.1, z * 0.1) - 0.5) * 5;
  const swell = (noise3(x * 0.06 + 40, y * 0.1, 2) - 0.5) * 3.4;
  const radius = Math.hypot(y * 0.75 + sway + 2, (z - 9 + swell) * 1.1) * rings;
  const uneven = radius + noise3(radius * 0.45, 5, 7) * 1.6;
  const turn = uneven - Math.floor(uneven);
  return smooth(0.25, 0.9, turn) * (1 - smooth(0.92, 1, turn));
}

function addPores(sample: Sample, x: number, y: number, z: number, pore: Rgb, strength: number) {
  const dash = smooth(0.66, 0.8, noise3(x * 1.1, y * 24, z * 24 + 60)) * strength;
  sample.r += (pore[0] - sample.r) * dash;
  sample.g += (pore[1] - sample.g) * dash;
  sample.b += (pore[2] - sample.b) * dash;
}

/** Brightness of the figure across the grain: the fibres' waves catch the light. */
function figureShare(figure: Figure, x: number, y: number, z: number): number {
  if (figure === 'plain') return 1;
  if (figure === 'flame') {
    const wander = cloud(x * 0.13, y * 0.24, z * 0.24) * 5 + y * 0.1;
    const band = noise3(x * 1.5 + wander, y * 0.22, z * 0.22 + 3);
    const silk = noise3(x * 3.4 + wander * 2, y * 1.1, z * 1.1);
    const strength = 0.35 + 0.65 * noise3(x * 0.08, y * 0.09, 11);
    return 1 + (smooth(0.25, 0.75, band) * 0.8 + silk * 0.2 - 0.55) * 1.05 * strength;
  }
  const warp = noise3(x * 0.4, y * 0.4, 5) * 2.4;
  const cell = noise3(x * 1.05 + warp, y * 0.42 - warp * 0.5, z * 0.3);
  const ripple = noise3(x * 2.3 + warp * 2, y * 0.75 + warp, z * 0.4 + 8);
  const silk = noise3(x * 5 + warp * 3, y * 2.2, z);
  return 0.66 + smooth(0.22, 0.78, cell) * 0.36 + smooth(0.25, 0.75, ripple) * 0.24 + (silk - 0.5) * 0.12;
}
