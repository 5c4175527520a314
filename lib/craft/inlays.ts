import type { FretLine } from './fingerboard';
import { between, type Point } from './plane';

export type Inlay = 'none' | 'dots' | 'bass-side dots' | 'blocks';

export type InlayMark =
  { fret: number; kind: 'dot'; centre: Point; radiusMm: number } | { fret: number; kind: 'block'; corners: Point[] };

/** Where a neck has markers, within each octave; the octave itself has two. */
const MARKED = [3, 5, 7, 9, 12];
const DOT_RADIUS_MM = 3;

/** Shares of the way from the treble end to the bass end of a fret. */
const MIDDLE = 0.5;
const PAIR = [0.23, 0.77];
const BASS_SIDE = 0.86;
const BASS_PAIR = [0.7, 0.86];
const BLOCK = [0.16, 0.84];
const BLOCK_PAIR = [
  [0.1, 0.44],
  [0.56, 0.9],
];
/** A block's share of the space between its frets. */
const BLOCK_ALONG = [0.22, 0.78];

/** The frets that carry a marker up to `fretCount`, `isDouble` at every octave. */
export function markedFrets(fretCount: number): { fret: number; isDouble: boolean }[] {
  return Array.from({ length: fretCount }, (_, i) => i + 1)
    .filter((fret) => MARKED.includes(((fret - 1) % 12) + 1))
    .map((fret) => ({ fret, isDouble: fret % 12 === 0 }));
}

/** Marks centred between a fret and the one before it, in mm. `frets` starts with the nut. */
export function inlayMarks(inlay: Inlay, frets: readonly FretLine[]): InlayMark[] {
  if (inlay === 'none') return [];
  return markedFrets(frets.length - 1).flatMap(({ fret, isDouble }) => {
    const [before, after] = [frets[fret - 1], frets[fret]];
    if (!before || !after) return [];
    return inlay === 'blocks' ? blocks(before, after, isDouble) : dots(before, after, shares(inlay, isDouble));
  });
}

function shares(inlay: 'dots' | 'bass-side dots', isDouble: boolean): number[] {
  if (inlay === 'dots') return isDouble ? PAIR : [MIDDLE];
  return isDouble ? BASS_PAIR : [BASS_SIDE];
}

function dots(before: FretLine, after: FretLine, across: number[]): InlayMark[] {
  const room = Math.abs(after.treble.x - before.treble.x);
  const radiusMm = Math.min(DOT_RADIUS_MM, room * 0.3);
  return across.map((share) => ({
    fret: after.fret,
    kind: 'dot',
    centre: between(alongFret(before, share), alongFret(after, share), 0.5),
    radiusMm,
  }));
}

function blocks(before: FretLine, after: FretLine, isDouble: boolean): InlayMark[] {
  const [from = 0, to = 1] = BLOCK_ALONG;
  return (isDouble ? BLOCK_PAIR : [BLOCK]).map(([top = 0, bottom = 1]) => {
    const corner = (across: number, along: number) =>
      between(alongFret(before, across), alongFret(after, across), along);
    const corners = [corner(top, from), corner(bottom, from), corner(bottom, to), corner(top, to)];
    return { fret: after.fret, kind: 'block', corners };
  });
}

function alongFret({ treble, bass }: FretLine, share: number): Point {
  return between(treble, bass, share);
}
