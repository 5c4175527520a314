import type { Measure } from './measure';

/**
 * One row of a shop's own set-up figures. `seen`: the aim was read in a maker's or shop's publication; `practice`: trade habit
 * without a source, and said so where it is shown.
 */
export type SetupRange = {
  key: string;
  kind: 'relief' | 'nut_slot' | 'action' | 'pickup_height' | 'intonation';
  instrument: 'guitar' | 'bass';
  aim: Measure;
  tolerance: string;
  how: string;
  provenance: 'seen' | 'practice';
};

const RELIEF_HOW =
  'Tuned, held at the first and the last fret, gap under the string at the 7th; below 0 is a back-bow.';
const ACTION_HOW = 'Tuned, open string, bottom of the string to the top of the 12th fret.';
const NUT_HOW = 'Open string, bottom of the string to the top of the first fret.';
const PICKUP_HOW = 'Open outer string to the pole.';
const INTONATION_HOW = 'Note fretted at the 12th against its harmonic; sharp is positive.';

type Row = [
  key: string,
  kind: SetupRange['kind'],
  aim: Measure,
  tolerance: string,
  provenance: SetupRange['provenance'],
];

const inches = (text: string): Measure => ({ text, unit: 'in' });
const sixtyFourths = (text: string): Measure => ({ text, unit: '64ths' });
const cents = (text: string): Measure => ({ text, unit: 'cents' });

const hows: Record<SetupRange['kind'], string> = {
  relief: RELIEF_HOW,
  nut_slot: NUT_HOW,
  action: ACTION_HOW,
  pickup_height: PICKUP_HOW,
  intonation: INTONATION_HOW,
};

const rowsFor = (instrument: SetupRange['instrument'], rows: Row[]): SetupRange[] =>
  rows.map(([key, kind, aim, tolerance, provenance]) => ({
    key,
    kind,
    instrument,
    aim,
    tolerance,
    how: hows[kind],
    provenance,
  }));

/**
 * Where a shop starts from; every row is meant to be edited. Seen: guitar relief 0 to 0.012 in and the string heights at the
 * first fret (kit manuals), bass relief 0.018 in (a repair shop's article), pickup heights of 5 to 6 and 4 to 5 32nds (a
 * maker's manual), which are written here in 64ths. Tolerances around a single seen figure are practice too.
 */
export const setupRanges: readonly SetupRange[] = [
  ...rowsFor('guitar', [
    ['relief', 'relief', inches('0.006'), '0.006', 'seen'],
    ['nut_slot_plain', 'nut_slot', inches('0.012'), '0.004', 'seen'],
    ['nut_slot_wound', 'nut_slot', inches('0.020'), '0.004', 'seen'],
    ['action_treble', 'action', sixtyFourths('4'), '1', 'practice'],
    ['action_bass', 'action', sixtyFourths('5'), '1', 'practice'],
    ['pickup_neck', 'pickup_height', sixtyFourths('11'), '1', 'seen'],
    ['pickup_middle', 'pickup_height', sixtyFourths('10'), '2', 'practice'],
    ['pickup_bridge', 'pickup_height', sixtyFourths('9'), '1', 'seen'],
    ['intonation', 'intonation', cents('0'), '3', 'practice'],
  ]),
  ...rowsFor('bass', [
    ['relief', 'relief', inches('0.018'), '0.006', 'seen'],
    ['nut_slot_plain', 'nut_slot', inches('0.020'), '0.005', 'practice'],
    ['nut_slot_wound', 'nut_slot', inches('0.022'), '0.006', 'practice'],
    ['action_treble', 'action', sixtyFourths('5'), '1', 'practice'],
    ['action_bass', 'action', sixtyFourths('6'), '1', 'practice'],
    ['pickup_neck', 'pickup_height', sixtyFourths('12'), '3', 'practice'],
    ['pickup_middle', 'pickup_height', sixtyFourths('11'), '3', 'practice'],
    ['pickup_bridge', 'pickup_height', sixtyFourths('10'), '3', 'practice'],
    ['intonation', 'intonation', cents('0'), '3', 'practice'],
  ]),
];
