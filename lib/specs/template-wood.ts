import type { SpecItem } from './document';
import { choice, inGroup, look, material, measure } from './template-items';

/** Body, neck, fingerboard and finish of a solid six-string. Every value is common practice, there to be changed. */
export const woodItems: SpecItem[] = [
  ...inGroup('body', [
    material('body_wood', 'Body wood', ['mahogany', 'two pieces, centre joint'], ['blanks', 'blanks']),
    material('top_wood', 'Top', ['bigleaf_maple', 'figured, bookmatched'], ['blanks', 'blanks']),
    measure('top_thickness', 'Thickness of the top', ['5/16', 'in', '1/32'], ['blanks', 'blanks']),
    choice('body_shape', 'Outline', ['house outline', 'house outline, deep cutaways'], ['machining', 'machining']),
    measure('body_width', 'Body width at the lower bout', ['12.75', 'in', '0.060'], ['machining', 'machining']),
    measure('body_thickness', 'Body thickness', ['1.750', 'in', '0.030'], ['machining', 'machining']),
    choice('body_edge', 'Edge', ['1/8 in round-over', 'belly and arm carve', 'bound'], ['machining', 'body-joint']),
    choice('neck_joint', 'Neck joint', ['set, long tenon', 'bolted, four screws'], ['machining', 'body-joint']),
    measure('body_weight', 'Body weight before paint', ['2300', 'g', '250'], ['blanks', 'pre-paint']),
  ]),
  ...inGroup('neck', [
    material('neck_wood', 'Neck wood', ['sugar_maple', 'quarter-sawn, three pieces'], ['blanks', 'blanks']),
    choice(
      'truss_rod',
      'Truss rod',
      ['two-way, wheel at the body', 'two-way, nut at the head'],
      ['blanks', 'neck-board'],
    ),
    choice('neck_profile', 'Back of the neck', ['C', 'D', 'soft V', 'your drawing'], ['machining', 'neck-board']),
    measure('neck_depth_1', 'Depth at the 1st fret', ['0.830', 'in', '0.010'], ['machining', 'neck-board']),
    measure('neck_depth_12', 'Depth at the 12th fret', ['0.900', 'in', '0.015'], ['machining', 'neck-board']),
    measure('headstock_angle', 'Angle of the head', ['10', 'deg', '0.5'], ['blanks', 'blanks']),
    look('headstock_logo', 'Headstock logo', 'house logo, shell', ['pre-paint', 'pre-paint']),
  ]),
  ...inGroup('fingerboard', [
    material('fingerboard_wood', 'Fingerboard wood', ['ebony', 'one piece'], ['machining', 'neck-board']),
    measure('scale_length', 'Scale length', ['25.5', 'in', '0.005'], ['machining', 'machining']),
    measure('fret_count', 'Frets', ['22', 'count'], ['machining', 'frets']),
    measure('nut_width', 'Nut width', ['1.700', 'in', '0.010'], ['machining', 'neck-board']),
    measure('last_fret_width', 'Width at the last fret', ['2.240', 'in', '0.015'], ['machining', 'neck-board']),
    measure('radius', 'Fingerboard radius', ['12', 'in', '1/2'], ['machining', 'neck-board']),
    look('inlay', 'Inlay', 'shell dots, 6 mm', ['neck-board', 'neck-board']),
    choice('side_dots', 'Side dots', ['glow, 2 mm', 'shell, 2 mm', 'black, 2 mm'], ['neck-board', 'neck-board']),
    choice(
      'fret_wire',
      'Fret wire',
      ['medium jumbo, nickel silver', 'jumbo, steel', 'low, nickel silver'],
      ['frets', 'frets'],
    ),
    choice('fret_ends', 'Fret ends', ['rolled', 'bevelled at 35 degrees'], ['frets', 'frets']),
    material('nut_material', 'Nut', ['bone', 'bleached'], ['frets', 'hardware-setup']),
  ]),
  ...inGroup('finish', [
    look('finish_colour', 'Colour', 'your sample 1', ['colour-clear', 'colour-clear']),
    look('edge_colour', 'Edge colour', 'your sample 1, darker to the edge', ['colour-clear', 'colour-clear']),
    choice('back_colour', 'Back and sides', ['as the top', 'natural', 'black'], ['colour-clear', 'colour-clear']),
    choice('gloss', 'Sheen', ['gloss', 'satin', 'matt'], ['colour-clear', 'sand-buff']),
    measure('film_thickness', 'Film when cured', ['150', 'um', '40'], ['colour-clear', 'sand-buff']),
    choice('neck_finish', 'Back of the neck feels', ['satin', 'gloss', 'oiled'], ['colour-clear', 'sand-buff']),
  ]),
];
