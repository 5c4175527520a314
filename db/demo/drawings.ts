import { circle, dimension, drawSheet, type SheetNotes } from './drawing-sheet';

export type DrawingKind = 'headstock' | 'inlay' | 'controls';

const HEADSTOCK =
  '1.4 w 150 250 m 150 330 l 210 352 l 300 398 430 420 560 404 c 604 398 634 372 640 338 c 646 300 610 262 560 246 c 440 214 300 220 210 236 c 150 250 l S';

/** Letters of the house logo, wider from drawing to drawing. */
function logo(revision: number): string {
  const wide = 1 + (revision - 1) * 0.12;
  const x = (dx: number) => (330 + dx * wide).toFixed(1);
  return [
    `2 w ${x(0)} 300 m ${x(20)} 350 ${x(46)} 350 ${x(44)} 316 c ${x(42)} 292 ${x(6)} 290 ${x(8)} 318 c S`,
    `${x(34)} 306 m ${x(52)} 288 l S`,
    `${x(66)} 300 m ${x(72)} 344 l ${x(84)} 310 l ${x(98)} 346 l ${x(104)} 300 l S`,
    `${x(116)} 300 m ${x(126)} 332 ${x(148)} 334 ${x(152)} 312 c ${x(154)} 296 ${x(130)} 292 ${x(122)} 304 c S`,
    `0.8 w ${x(-8)} 286 m ${x(60)} 276 ${x(120)} 278 ${x(168)} 288 c S`,
  ].join('\n');
}

const tuners = [338, 365, 378, 386, 386, 380].map((y, i) => circle(236 + i * 64, y, 9)).join('\n');

function headstock(revision: number): string {
  const widePt = 154 * (1 + (revision - 1) * 0.12);
  const middle = '0.5 w [6 4] 0 d 150 290 m 640 290 l S [] 0 d';
  return [HEADSTOCK, tuners, logo(revision), dimension(330, 330 + widePt, 200), middle].join('\n');
}

function inlay(revision: number): string {
  const frets = Array.from({ length: 6 }, (_, i) => 150 + i * (104 - i * 3));
  const bars = frets.map((x) => `1.6 w ${x} 220 m ${x} 400 l S`).join('\n');
  const dots = frets.slice(1).map((x) => circle(x - 46, 310, 6 + revision * 2));
  return ['1.2 w 130 220 560 180 re S', bars, ...dots, dimension(150, 251, 190)].join('\n');
}

/** The layout is drawn at half its size. */
const CONTROLS_SMALLER = 2;

function controls(revision: number): string {
  const knobs = [0, 1, 2].map((i) => circle(330 + i * 88, 300 - i * (14 + revision * 4), 22));
  const holes = [0, 1, 2].map((i) => circle(330 + i * 88, 300 - i * (14 + revision * 4), 6));
  const body = '1.4 w 180 420 m 360 470 600 430 650 330 c 680 260 620 180 520 168 c 400 156 250 180 190 240 c S';
  return [body, ...knobs, ...holes, dimension(330, 418, 190, CONTROLS_SMALLER)].join('\n');
}

const kinds = { headstock, inlay, controls };

/** A workshop drawing as PDF; `revision` counts from 1, and each looks a little different. */
export const drawDrawing = (kind: DrawingKind, revision: number, notes: Omit<SheetNotes, 'scale'>): Buffer =>
  drawSheet({ ...notes, scale: `1 : ${kind === 'controls' ? CONTROLS_SMALLER : 1}` }, kinds[kind](revision));
