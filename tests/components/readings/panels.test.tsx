import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, test } from 'vitest';
import { ReadingsPanel } from '@/components/readings/readings-panel';
import { PHOTO_COLOUR_SENTENCE } from '@/lib/craft/colour-difference';
import { PLACEHOLDER_SENTENCE } from '@/lib/craft/finish-windows';
import { TRUSS_ROD_SENTENCE } from '@/lib/craft/set-up';
import { nothingTyped, type TypedReadings } from '@/lib/readings/typed';
import type { Work } from '@/lib/work';

const bench = { items: [], scaleLengthIn: 25.5, coats: [], lastCoatAtMs: null };

function panelHtml(work: Work, over: Partial<TypedReadings> = {}): string {
  return renderToStaticMarkup(
    <ReadingsPanel
      stage={{ id: 's', key: 's', name: 'This stage', work }}
      bench={bench}
      readings={{ typed: { ...nothingTyped, ...over }, stand: null }}
      isMissingSaid={false}
      isLocked={false}
      onType={() => undefined}
    />,
  ).replaceAll('&#x27;', "'");
}

describe('the panel of the finish room', () => {
  test('says that waiting times are placeholders, and that a photograph is no measurement', () => {
    const html = panelHtml('finish');
    expect(html).toContain(PLACEHOLDER_SENTENCE);
    expect(html).toContain(PHOTO_COLOUR_SENTENCE);
  });

  test('shows the waiting times of what is on the can', () => {
    expect(panelHtml('finish', { product: 'Water-borne clear' })).toContain('5 to 21 days.');
    expect(panelHtml('finish', { product: 'Clear lacquer' })).toContain('10 to 28 days.');
  });

  test('says at once what the booth and the coat come to', () => {
    const html = panelHtml('finish', {
      temperature: '72 F',
      humidity: '48',
      product: 'Clear',
      coatNumber: '1',
      wetFilm: '120',
      volumeSolids: '25',
    });
    expect(html).toContain('22.2 °C (72 °F), 48 %');
    // 10 x 25 % / 30 µm, by definition of volume solids.
    expect(html).toContain('a litre covers 8.3 m²');
  });
});

test('the panel of the wood room says which air holds the wood where it is', () => {
  const html = panelHtml('wood', { temperature: '21', humidity: '45', moisture: '8.4' });
  expect(html).toMatch(/At 21 °C the wood stays at 8\.4 % in air that is kept at 4\d % humidity\./);
});

test('the set-up sheet says how far a rod is turned, and which way a saddle goes', () => {
  const html = panelHtml('setup', { measures: { 'setup:intonation_1': '5' } });
  expect(html).toContain(TRUSS_ROD_SENTENCE);
  expect(html).toContain('outside ± 3 cents: move the saddle away from the neck');
});
