/** One lit point: where it is, and what its material answers. Reused between points. */
export type Sample = {
  /** Place in the object's own space, cm. */
  x: number;
  y: number;
  z: number;
  /** The object's own side: 1 where the surface looks up in the world. */
  facing: number;
  /** Distance in from the outline, cm. */
  edge: number;
  /** Width of one picture pixel at this distance, cm. */
  footprint: number;
  /** Linear light, 0 to 1. */
  r: number;
  g: number;
  b: number;
  rough: number;
  /** Strength of a clear layer over the colour, 0 to 1. */
  coat: number;
  coatRough: number;
  metal: number;
  bumpX: number;
  bumpY: number;
  opacity: number;
  glow: number;
  /** After lighting: what the key light adds where nothing shades it, and the share that reaches the point. */
  keyR: number;
  keyG: number;
  keyB: number;
  share: number;
};

export const freshSample = (): Sample => ({
  x: 0,
  y: 0,
  z: 0,
  facing: 0,
  edge: 0,
  footprint: 0,
  r: 0,
  g: 0,
  b: 0,
  rough: 0,
  coat: 0,
  coatRough: 0,
  metal: 0,
  bumpX: 0,
  bumpY: 0,
  opacity: 1,
  glow: 0,
  keyR: 0,
  keyG: 0,
  keyB: 0,
  share: 0,
});

/** `film` materials (glass, water, dust, chalk) let what lies under them show. */
export type Material = { layer: 'solid' | 'film'; paint: (sample: Sample) => void };

export type Rgb = readonly [number, number, number];

const toLinear = (value: number) => (value <= 0.04045 ? value / 12.92 : ((value + 0.055) / 1.055) ** 2.4);

/** #rrggbb to linear light. */
export function linear(hex: string): Rgb {
  const part = (from: number) => toLinear(Number.parseInt(hex.slice(from, from + 2), 16) / 255);
  return [part(1), part(3), part(5)];
}

export function tint(sample: Sample, [r, g, b]: Rgb, scale = 1) {
  sample.r = r * scale;
  sample.g = g * scale;
  sample.b = b * scale;
}

export function blend(sample: Sample, [r, g, b]: Rgb, amount: number) {
  sample.r += (r - sample.r) * amount;
  sample.g += (g - sample.g) * amount;
  sample.b += (b - sample.b) * amount;
}
