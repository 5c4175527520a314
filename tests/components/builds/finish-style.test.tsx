import { readFileSync } from 'node:fs';
import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, test } from 'vitest';
import { finishKey, FinishStyle, FinishStyles } from '@/components/builds/finish-style';
import { finishTones } from '@/lib/craft/colour';
import { neckSpacing } from '@/lib/craft/frets';

describe('the finish of a page', () => {
  const markup = renderToStaticMarkup(<FinishStyle finishHex="#8C1D2B" nonce="r4nd0m" />);

  test('is a style element with the nonce of the page, in both themes', () => {
    expect(markup).toMatch(/^<style nonce="r4nd0m">html:root\{/);
    const [light = '', dark = ''] = markup.split('@media (prefers-color-scheme:dark)');
    expect(light).toContain(`--finish-deep:${finishTones('#8c1d2b', 'light').finishDeep}`);
    expect(dark).toContain(`--finish-deep:${finishTones('#8c1d2b', 'dark').finishDeep}`);
  });

  test('holds nothing that markup has to escape, so the browser reads the rules as they are', () => {
    expect(renderToStaticMarkup(<FinishStyles finishHexes={['#8c1d2b', '#ffffff']} />)).not.toMatch(/&\w+;/);
  });

  test('that is no colour is refused before it reaches the page', () => {
    expect(() => renderToStaticMarkup(<FinishStyle finishHex="red}body{display:none" />)).toThrow(RangeError);
    expect(() => finishKey('teal')).toThrow(RangeError);
  });

  test('is written once however many builds wear it', () => {
    const both = renderToStaticMarkup(<FinishStyles finishHexes={['#8c1d2b', '#8C1D2B', '#ffff00']} />);
    expect(both.match(/\[data-finish=f8c1d2b\]/g)).toHaveLength(2);
    expect(both.match(/\[data-finish=fffff00\]/g)).toHaveLength(2);
  });
});

test('the stylesheet spaces a row of frets as the neck is drawn', () => {
  const css = readFileSync('app/globals.css', 'utf8');
  const grows = [...css.matchAll(/nth-child\((\d+)\) \{\s*flex-grow: ([\d.]+);/g)].map(([, , grow]) => Number(grow));
  expect(grows).toHaveLength(24);
  const boundaries = neckSpacing(grows.length);
  const whole = grows.reduce((sum, grow) => sum + grow, 0);
  let end = 0;
  grows.forEach((grow, index) => {
    end += grow / whole;
    expect(end).toBeCloseTo(boundaries[index + 1] ?? Number.NaN, 5);
  });
});
