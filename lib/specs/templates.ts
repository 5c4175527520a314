import type { SpecDocument, SpecItem } from './document';
import { choice, measure, varied } from './template-items';
import { partItems } from './template-parts';
import { woodItems } from './template-wood';

export type SpecTemplate = { name: string; document: SpecDocument };

const setUp: [string, string] = ['hardware-setup', 'hardware-setup'];
const cut: [string, string] = ['machining', 'machining'];

const sixString: SpecItem[] = [...woodItems, ...partItems];

const baritone = varied(sixString, {
  instead: [
    measure('scale_length', 'Scale length', ['27', 'in', '0.005'], cut),
    measure('fret_count', 'Frets', ['24', 'count'], ['machining', 'frets']),
    choice('tuning', 'Tuning', ['B1 E2 A2 D3 F#3 B3'], setUp),
    choice('gauges', 'Gauges', ['14 19p 26 38 50 62'], setUp),
    measure('action_bass', 'Action at the 12th fret, bass side', ['6', '64ths', '1'], setUp),
  ],
});

const multiscaleSeven = varied(sixString, {
  instead: [
    measure('scale_length', 'Scale length, treble side', ['25.5', 'in', '0.005'], cut),
    measure('fret_count', 'Frets', ['24', 'count'], ['machining', 'frets']),
    measure('nut_width', 'Nut width', ['1.890', 'in', '0.010'], ['machining', 'neck-board']),
    measure('last_fret_width', 'Width at the last fret', ['2.560', 'in', '0.015'], ['machining', 'neck-board']),
    measure('string_count', 'Strings', ['7', 'count'], ['machining', 'hardware-setup']),
    choice('tuning', 'Tuning', ['B1 E2 A2 D3 G3 B3 E4'], setUp),
    choice('gauges', 'Gauges', ['10 13 17 26 36 46 60'], setUp),
    choice('bridge', 'Bridge', ['single saddles, following the frets'], ['machining', 'hardware-setup']),
  ],
  after: {
    scale_length: [
      measure('bass_scale_length', 'Scale length, bass side', ['27', 'in', '0.005'], cut),
      measure('perpendicular_fret', 'Perpendicular fret', ['8', 'count'], cut),
    ],
  },
});

const hollow = varied(sixString, {
  instead: [
    measure('scale_length', 'Scale length', ['25', 'in', '0.005'], cut),
    measure('body_width', 'Body width at the lower bout', ['15.75', 'in', '0.060'], cut),
    measure('body_thickness', 'Body thickness at the rim', ['2.250', 'in', '0.040'], cut),
    choice('body_edge', 'Edge', ['bound', '1/8 in round-over'], ['machining', 'body-joint']),
    choice('bridge', 'Bridge', ['wooden, on two posts', 'fixed, stop bar'], ['machining', 'hardware-setup']),
    choice('gauges', 'Gauges', ['11 14 18p 28 38 49'], setUp),
  ],
  after: {
    top_thickness: [
      choice('sound_holes', 'Sound holes', ['two f-holes', 'one, bass side', 'none'], ['machining', 'machining']),
      choice('centre_block', 'Centre block', ['spruce, full length', 'none'], ['blanks', 'body-joint']),
    ],
  },
});

const bass = varied(sixString, {
  instead: [
    measure('body_width', 'Body width at the lower bout', ['13.25', 'in', '0.060'], cut),
    measure('scale_length', 'Scale length', ['34', 'in', '0.005'], cut),
    measure('fret_count', 'Frets', ['24', 'count'], ['machining', 'frets']),
    measure('nut_width', 'Nut width', ['1.500', 'in', '0.010'], ['machining', 'neck-board']),
    measure('last_fret_width', 'Width at the last fret', ['2.480', 'in', '0.015'], ['machining', 'neck-board']),
    measure('string_count', 'Strings', ['4', 'count'], ['machining', 'hardware-setup']),
    choice('tuning', 'Tuning', ['E1 A1 D2 G2'], setUp),
    choice('gauges', 'Gauges', ['45 65 85 105'], setUp),
    measure('tension_low', 'Lightest string pulls at least', ['34', 'lb'], setUp),
    measure('tension_high', 'Heaviest string pulls at most', ['50', 'lb'], setUp),
    measure('relief', 'Relief at the 7th fret', ['0.018', 'in', '0.006'], setUp),
    measure('action_treble', 'Action at the 12th fret, treble side', ['5', '64ths', '1'], setUp),
    measure('action_bass', 'Action at the 12th fret, bass side', ['6', '64ths', '1'], setUp),
  ],
});

/**
 * What a new order of one instrument starts its spec from. Starting values are common practice without a source, meant to be
 * changed; stages are named by the keys of the house routes.
 */
export const starterTemplates: readonly SpecTemplate[] = [
  { name: 'Six-string, solid body', document: { items: sixString } },
  { name: 'Baritone', document: { items: baritone } },
  { name: 'Seven-string, two scales', document: { items: multiscaleSeven } },
  { name: 'Hollow body', document: { items: hollow } },
  { name: 'Bass', document: { items: bass } },
];
