import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, test } from 'vitest';
import { readingWords, ToleranceBar } from '@/components/readings/tolerance-bar';

const band = { low: 0, high: 0.012 };
const bar = (value: number, props: Partial<Parameters<typeof ToleranceBar>[0]> = {}) =>
  renderToStaticMarkup(<ToleranceBar value={value} unit="in" band={band} {...props} />);

/** Where the stroke of the value stands, percent of the bar. */
const strokeAt = (markup: string) => Number(/<svg x="([\d.]+)%"/.exec(markup)?.[1]);
const bandAt = (markup: string) => {
  const [, x, width] = /<rect x="([\d.]+)%" y="6" width="([\d.]+)%"/.exec(markup) ?? [];
  return { low: Number(x), high: Number(x) + Number(width) };
};

describe('a reading as a bar', () => {
  test.each([0, 0.006, 0.012])('puts %d within its band', (value) => {
    const markup = bar(value);
    expect(strokeAt(markup)).toBeGreaterThanOrEqual(bandAt(markup).low);
    expect(strokeAt(markup)).toBeLessThanOrEqual(bandAt(markup).high);
    expect(markup).not.toContain('late');
  });

  test('says a value out of tolerance in words and colour, outside its band', () => {
    const markup = bar(0.014);
    expect(strokeAt(markup)).toBeGreaterThan(bandAt(markup).high);
    expect(markup).toContain('0.014 in, over 0.012 in');
    expect(markup).toContain('text-late');
  });

  test.each([-5, 5])('keeps %d on the bar, with an arrow', (value) => {
    const markup = bar(value);
    expect([0, 100]).toContain(strokeAt(markup));
    expect(markup).toContain('<path');
  });

  test('with a limit only, a smaller value is nearer the start', () => {
    const at = (value: number) => strokeAt(bar(value, { band: { high: 2 }, unit: 'ΔE' }));
    expect(at(0)).toBe(0);
    expect(at(1)).toBeLessThan(at(2));
    expect(at(2)).toBeLessThan(at(3));
  });

  test.each([Number.NaN, Number.POSITIVE_INFINITY])('does not break the page with %d', (value) => {
    expect(bar(value)).not.toMatch(/="[^"]*NaN/);
  });

  test('does not break where the tolerance is nothing', () => {
    expect(bar(1, { band: { low: 1, high: 1 } })).not.toMatch(/="[^"]*NaN|Infinity/);
  });

  test('shows the words it is given, and names what it measures', () => {
    const markup = bar(0.01, { words: 'within ± 0.006 in', label: 'Relief' });
    expect(markup).toContain('within ± 0.006 in');
    expect(markup).toContain('Relief: ');
  });

  test('carries no style attribute, which the page would refuse', () => expect(bar(0.01)).not.toContain('style='));
});

test.each([
  [9.4, '%', { low: 6, high: 8 }, '9.4 %, over 8 %'],
  [5, '%', { low: 6, high: 8 }, '5 %, under 6 %'],
  [7, '%', { low: 6, high: 8 }, '7 %, within 6 to 8 %'],
  [1.4, 'ΔE', { high: 2 }, '1.4 ΔE, limit 2 ΔE'],
  [12, '', { low: 10 }, '12, at least 10'],
])('%d %s against %j reads "%s"', (value, unit, ends, words) => {
  expect(readingWords(value, unit, ends, 3)).toBe(words);
});
