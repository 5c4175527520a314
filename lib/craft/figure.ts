const formats = new Map<number, Intl.NumberFormat>();

/** A number as people read it, "1,604.2": at most so many decimals, no zeros to fill them up, and never "-0". */
export function figure(value: number, decimals: number): string {
  const known =
    formats.get(decimals) ??
    new Intl.NumberFormat('en-GB', { maximumFractionDigits: decimals, signDisplay: 'negative' });
  formats.set(decimals, known);
  return known.format(value);
}
