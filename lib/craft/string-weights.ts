export type Construction = 'plain' | 'wound';

/**
 * Weight of a string in lb per inch of its length, by gauge in thou. Source: D'Addario, A Complete Technical Reference for Fretted
 * Instrument String Tensions: plain steel, and nickel-plated round wound on steel. Another maker's strings differ by up to a tenth.
 */
const unitWeights: Record<Construction, readonly (readonly [gaugeThou: number, lbPerIn: number])[]> = {
  plain: [
    [7, 1.085e-5],
    [8, 1.418e-5],
    [8.5, 1.601e-5],
    [9, 1.794e-5],
    [9.5, 1.999e-5],
    [10, 2.215e-5],
    [10.5, 2.442e-5],
    [11, 2.68e-5],
    [11.5, 2.93e-5],
    [12, 3.19e-5],
    [13, 3.744e-5],
    [13.5, 4.037e-5],
    [14, 4.342e-5],
    [15, 4.984e-5],
    [16, 5.671e-5],
    [17, 6.402e-5],
    [18, 7.177e-5],
    [19, 7.997e-5],
    [20, 8.861e-5],
    [22, 10.722e-5],
    [24, 12.76e-5],
    [26, 14.975e-5],
  ],
  wound: [
    [17, 5.524e-5],
    [18, 6.215e-5],
    [19, 6.947e-5],
    [20, 7.495e-5],
    [21, 8.293e-5],
    [22, 9.184e-5],
    [24, 10.857e-5],
    [26, 12.671e-5],
    [28, 14.666e-5],
    [30, 17.236e-5],
    [32, 19.347e-5],
    [34, 21.59e-5],
    [36, 23.964e-5],
    [38, 26.471e-5],
    [39, 27.932e-5],
    [42, 32.279e-5],
    [44, 35.182e-5],
    [46, 38.216e-5],
    [48, 41.382e-5],
    [49, 43.014e-5],
    [52, 48.109e-5],
    [54, 53.838e-5],
    [56, 57.598e-5],
    [59, 64.191e-5],
    [60, 66.542e-5],
    [62, 70.697e-5],
    [64, 74.984e-5],
    [66, 79.889e-5],
    [68, 84.614e-5],
    [70, 89.304e-5],
    [72, 94.124e-5],
    [74, 98.869e-5],
    [80, 115.011e-5],
  ],
};

/** The gauges in thou whose weight was published, lightest first. */
export function listedGauges(construction: Construction): number[] {
  return unitWeights[construction].map(([gaugeThou]) => gaugeThou);
}

/**
 * Weight in lb per inch, and whether it was published for this gauge or lies between its two neighbours (in proportion to the
 * square of the gauge, as the weight of solid wire does); null outside the published gauges.
 */
export function unitWeight(
  gaugeThou: number,
  construction: Construction,
): { lbPerIn: number; isListed: boolean } | null {
  const weights = unitWeights[construction];
  const above = weights.find(([gauge]) => gauge >= gaugeThou);
  const below = weights.findLast(([gauge]) => gauge <= gaugeThou);
  if (!above || !below) return null;
  if (above[0] === gaugeThou) return { lbPerIn: above[1], isListed: true };
  const share = (gaugeThou ** 2 - below[0] ** 2) / (above[0] ** 2 - below[0] ** 2);
  return { lbPerIn: below[1] + share * (above[1] - below[1]), isListed: false };
}
