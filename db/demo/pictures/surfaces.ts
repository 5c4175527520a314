import { blend, linear, type Material, type Rgb, type Sample, tint } from './material';
import { cloud, noise3, smooth } from './noise';
import { type Cut, paintWood, type Species } from './wood';

const solid = (paint: (sample: Sample) => void): Material => ({ layer: 'solid', paint });
const film = (paint: (sample: Sample) => void): Material => ({ layer: 'film', paint });

/** Wood as it comes from the saw or the sander; `worn` darkens it with handling. */
export const rawWood = (cut: Cut, sawn = 0): Material =>
  solid((sample) => {
    paintWood(sample, cut);
    if (sawn === 0) return;
    const kerf = noise3(sample.x * 5.5 + sample.y * 0.4, sample.y * 0.35, 3);
    const fuzz = cloud(sample.x * 0.8, sample.y * 2.5, sample.z * 2.5);
    tint(sample, [sample.r, sample.g, sample.b], 1 + (kerf - 0.5) * 0.5 * sawn);
    blend(sample, [0.42, 0.35, 0.27], 0.28 * sawn * fuzz);
    sample.bumpX += (kerf - 0.5) * 0.35 * sawn;
    sample.rough = 0.85;
  });

/** Usual brightness of each wood, against which dye takes up its figure. */
const BRIGHT: Record<Species, number> = {
  maple: 0.5,
  mahogany: 0.14,
  ash: 0.45,
  walnut: 0.1,
  rosewood: 0.04,
  ebony: 0.02,
  spruce: 0.5,
};

export type Colour = { hex: string; edgeHex?: string };

export type Coating = {
  cut: Cut;
  colour: Colour;
  /** 0 leaves the wood bare, 1 is the full colour. */
  strength?: number;
  /** Clear over it: 0 flat, 1 a mirror. */
  gloss?: number;
  /** How far the burst reaches in from the edge, cm. */
  reach?: number;
};

/** Dye over the grain, a burst where there is an edge colour, and clear over both. */
export function coated({ cut, colour, strength = 1, gloss = 1, reach = 6 }: Coating): Material {
  const middle = linear(colour.hex);
  const rim = linear(colour.edgeHex ?? colour.hex);
  const rimTone: Rgb = colour.edgeHex ? rim : [rim[0] * 0.62, rim[1] * 0.62, rim[2] * 0.62];
  return solid((sample) => {
    paintWood(sample, cut);
    const grain = (sample.r * 0.5 + sample.g * 0.4 + sample.b * 0.1) / BRIGHT[cut.species];
    const ragged = sample.edge + (cloud(sample.x * 0.35, sample.y * 0.35, 4) - 0.5) * 1.6;
    const inward = smooth(0.2, reach, ragged);
    const shade = (part: 0 | 1 | 2) => rimTone[part] + (middle[part] - rimTone[part]) * inward;
    const veil = 0.16 + 0.72 * Math.min(1.35, grain ** 1.5);
    const cover = strength * (1 - 0.12 * inward);
    const dyed: Rgb = [shade(0) * veil, shade(1) * veil, shade(2) * veil];
    if (strength === 1) blend(sample, dyed, cover);
    else soak(sample, dyed, strength);
    sample.coat = gloss > 0 ? 0.35 + 0.65 * gloss : 0;
    sample.coatRough = 0.34 - 0.31 * gloss;
    sample.bumpX += (cloud(sample.x * 1.1, sample.y * 1.1, 3) - 0.5) * 0.012;
    sample.bumpY = sample.bumpY * (1 - gloss) + (cloud(sample.x * 1.1, sample.y * 1.1, 7) - 0.5) * 0.012;
  });
}

/** Thin dye takes light away from the wood instead of lying over it. */
function soak(sample: Sample, [r, g, b]: Rgb, amount: number) {
  sample.r = sample.r ** (1 - amount) * r ** amount;
  sample.g = sample.g ** (1 - amount) * g ** amount;
  sample.b = sample.b ** (1 - amount) * b ** amount;
}

/** Bare metal with fine brushed lines along x. */
export const metal = (hex: string, rough: number, brushed = 0.5): Material => {
  const colour = linear(hex);
  return solid((sample) => {
    const seen = Math.min(1, 0.014 / sample.footprint);
    const line = (noise3(sample.x * 2, sample.y * 26, sample.z * 26) - 0.5) * seen;
    const stain = cloud(sample.x * 0.4, sample.y * 0.4, sample.z * 0.4) - 0.5;
    tint(sample, colour, 1 + stain * 0.16);
    sample.metal = 1;
    sample.rough = Math.max(0.06, rough + line * 0.12 * brushed + stain * 0.12);
    sample.bumpY = line * 0.14 * brushed;
  });
};

export const steel = () => metal('#c9ccd0', 0.24);
export const nickel = () => metal('#d8d4cc', 0.14, 0.05);
export const blackMetal = () => metal('#3a3b3e', 0.34, 0.15);
export const brass = () => metal('#d6ad62', 0.22, 0.2);

/** Plastic, rubber, card or paint: one colour, slightly uneven, with a sheen. */
export const plain = (hex: string, rough = 0.5, uneven = 0.12): Material => {
  const colour = linear(hex);
  return solid((sample) => {
    const mottle = cloud(sample.x * 0.7, sample.y * 0.7, sample.z * 0.7 + 2) - 0.5;
    const grit = noise3(sample.x * 17, sample.y * 17, sample.z * 17) - 0.5;
    tint(sample, colour, 1 + mottle * uneven * 2 + grit * uneven);
    sample.rough = rough + mottle * 0.15;
    sample.bumpX = grit * uneven * 0.5;
    sample.bumpY = -grit * uneven * 0.4;
  });
};

/** Woven or felted cloth. */
export const cloth = (hex: string): Material => {
  const colour = linear(hex);
  return solid((sample) => {
    const weave = noise3(sample.x * 11, sample.y * 11, sample.z * 11) - 0.5;
    const fold = cloud(sample.x * 0.14, sample.y * 0.2, sample.z * 0.2) - 0.5;
    tint(sample, colour, 1 + weave * 0.5 + fold * 0.5);
    sample.rough = 0.95;
    sample.bumpX = weave * 0.5 + fold * 0.5;
    sample.bumpY = noise3(sample.x * 11 + 5, sample.y * 11, 9) * 0.4 - 0.2;
  });
};

export const pearl = (): Material =>
  solid((sample) => {
    const swirl = smooth(0.25, 0.75, cloud(sample.x * 3.4, sample.y * 3.4 + sample.facing, sample.z * 2.6));
    const hue = smooth(0.3, 0.7, noise3(sample.x * 2.1 + 7, sample.y * 2.1, 4));
    tint(sample, [0.4 + swirl * 0.38, 0.5 + swirl * 0.3 - hue * 0.06, 0.44 + swirl * 0.22 + hue * 0.16]);
    sample.rough = 0.28;
    sample.coat = 0.7;
    sample.coatRough = 0.12;
  });

/** Something that shines by itself: a lamp tube or a lit display. */
export const glowing = (hex: string, power: number): Material => {
  const colour = linear(hex);
  return solid((sample) => {
    tint(sample, colour);
    sample.glow = power;
  });
};

/** Chalk or pencil: it only sits on the high spots. */
export const drawn = (hex: string, strength: number, tooth = 9): Material => {
  const colour = linear(hex);
  return film((sample) => {
    const catchOn = noise3(sample.x * tooth, sample.y * tooth, sample.z * tooth);
    tint(sample, colour);
    sample.rough = 0.9;
    sample.opacity = strength * smooth(0.16, 0.5, catchOn);
  });
};

/** A clear drop or pane that lightly tints what is under it. */
export const clear = (hex: string, opacity: number, gloss = 1): Material => {
  const colour = linear(hex);
  return film((sample) => {
    tint(sample, colour);
    sample.coat = gloss;
    sample.coatRough = 0.04;
    sample.opacity = opacity;
  });
};

/** Loose dust or mist lying in patches. */
export const dusty = (hex: string, amount: number, scale = 0.3): Material => {
  const colour = linear(hex);
  return film((sample) => {
    const patch = cloud(sample.x * scale, sample.y * scale, 4);
    const grit = noise3(sample.x * 9, sample.y * 9, sample.z * 9);
    tint(sample, colour, 0.85 + grit * 0.3);
    sample.rough = 0.95;
    const seen = Math.min(1, 0.02 / sample.footprint);
    sample.opacity = amount * smooth(0.3, 0.85, patch) * (0.62 + (grit - 0.5) * 0.9 * seen) * smooth(0, 4, sample.edge);
  });
};

export { film, solid };
