import { Circle, Line, Polygon, Svg } from '@react-pdf/renderer';
import { createElement as h } from 'react';
import { boardColours } from './paper-type.mjs';

const WIDTH_PT = 511;
const FRET_MM = 1.1;

/** @param {import('../craft/plane').Point[]} corners */
const points = (corners) => corners.map(({ x, y }) => `${x.toFixed(2)},${y.toFixed(2)}`).join(' ');

/**
 * The signed fingerboard, to scale with itself; the shape is computed as on the screen.
 * @param {{ board: NonNullable<import('./paper-plan').PaperPlan['board']> }} props
 */
export function PaperBoard({ board }) {
  const { left, right, top, bottom } = board.bounds;
  const [widthMm, heightMm] = [right - left, bottom - top];
  const frame = {
    viewBox: `${left} ${top} ${widthMm} ${heightMm}`,
    width: WIDTH_PT,
    height: (WIDTH_PT * heightMm) / widthMm,
  };
  return h(
    Svg,
    { ...frame, preserveAspectRatio: 'xMidYMid meet' },
    h(Polygon, { points: points(board.outline), fill: boardColours.wood }),
    ...board.frets.map(fretLine),
    ...board.inlays.map(inlayMark),
  );
}

/** @param {import('../craft/fingerboard').FretLine} line */
function fretLine({ fret, treble, bass }) {
  const isNut = fret === 0;
  const ends = { x1: treble.x, y1: treble.y, x2: bass.x, y2: bass.y };
  const stroke = isNut ? boardColours.nut : boardColours.fret;
  return h(Line, { ...ends, stroke, strokeWidth: isNut ? FRET_MM * 3 : FRET_MM });
}

/** @param {import('../craft/inlays').InlayMark} mark */
function inlayMark(mark) {
  if (mark.kind === 'block') return h(Polygon, { points: points(mark.corners), fill: boardColours.nut });
  return h(Circle, { cx: mark.centre.x, cy: mark.centre.y, r: mark.radiusMm, fill: boardColours.nut });
}
