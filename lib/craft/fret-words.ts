import type { FretTable } from './fret-table';
import type { FretSheet, SheetPage } from './fret-sheet';
import type { Fingerboard } from './fingerboard';
import { fretPosition, GAP_DIVISOR, ruleOf18ErrorCents, ruleOf18Position, slotErrorCents } from './frets';
import { MM_PER_INCH } from './units';

export type FretUnit = 'in' | 'mm';

/** A slot position in words: three decimals in inches, two in mm, as finely as a slot is cut. */
export function slotWords(mm: number, unit: FretUnit): string {
  const shown = unit === 'in' ? (mm / MM_PER_INCH).toFixed(3) : mm.toFixed(2);
  return Number(shown) === 0 ? shown.replace('-', '') : shown.replace('-', '−');
}

/** `Nut`, `12` or `Bridge`. */
export function fretName(fret: number | 'bridge'): string {
  if (fret === 'bridge') return 'Bridge';
  return fret === 0 ? 'Nut' : `${fret}`;
}

/** `27 in`, or both scales and the perpendicular fret. */
export function scaleWords(
  { bassScaleMm, trebleScaleMm, perpendicularFret, isMultiscale }: FretTable,
  unit: FretUnit,
): string {
  const treble = trimmed(trebleScaleMm, unit);
  if (!isMultiscale) return `${treble} ${unit}`;
  const square = perpendicularFret === 0 ? 'square at the nut' : `square at fret ${perpendicularFret}`;
  return `${trimmed(bassScaleMm, unit)} ${unit} on the bass side, ${treble} ${unit} on the treble side, ${square}`;
}

/** What the fingerboard drawing shows, for somebody who does not see it. */
export function fingerboardWords({ plan, table, inlays }: Fingerboard, unit: FretUnit): string {
  const width = `${trimmed(plan.nutWidthMm, unit)} ${unit} wide at the nut, ${trimmed(plan.lastFretWidthMm, unit)} ${unit} at the last fret`;
  const middle = table.rows.find(({ fret }) => fret === Math.min(12, plan.fretCount));
  const slot = middle
    ? ` Fret ${middle.fret} lies ${slotWords(middle.treble.fromNutMm, unit)} ${unit} from the nut${table.isMultiscale ? ' on the treble side' : ''}.`
    : '';
  return (
    `${count(plan.fretCount, 'fret')}, ${count(plan.stringCount, 'string')}, scale ${scaleWords(table, unit)}; ${width}.` +
    `${slot} ${inlayWords(
      plan.inlay,
      inlays.map(({ fret }) => fret),
    )}`
  );
}

/** What stands over the drawing. */
export function drawingCaption({ table }: Fingerboard, unit: FretUnit): string {
  const name = unit === 'in' ? 'inches' : 'mm';
  const where = table.isMultiscale
    ? `${name} from each side's own nut: treble above, bass below`
    : `${name} from the nut`;
  return `Fingerboard, drawn to scale. Slot positions in ${where}.`;
}

/** A slot's place can be missed by so much with a saw in good order: common practice, no source. */
const MISSED_MM = 0.1;

/** What a slot that is a little off does to its note, at the first fret and the last. */
export function slotErrorWords({ trebleScaleMm, rows }: FretTable): string {
  const frets = rows.flatMap(({ fret }) => (typeof fret === 'number' && fret > 0 ? [fret] : []));
  const cents = (fret: number) => slotErrorCents(trebleScaleMm, fret, MISSED_MM).toFixed(1);
  const [first = 1, last = first] = [frets[0], frets.at(-1)];
  const off = `${MISSED_MM} mm (${(MISSED_MM / MM_PER_INCH).toFixed(3)} in)`;
  return `A slot cut ${off} too near the bridge sounds ${cents(first)} cents sharp at fret ${first} and ${cents(last)} at fret ${last}.`;
}

/** How a board cut by the old rule of 18 differs from these slots, for whoever lays one beside them. */
export function ruleOf18Words({ trebleScaleMm }: FretTable): string {
  const short = fretPosition(trebleScaleMm, 12) - ruleOf18Position(trebleScaleMm, 12);
  const flat = Math.abs(ruleOf18ErrorCents(12)).toFixed(1);
  return `An old board may be cut by the rule of 18, an eighteenth of what is left to the bridge where these take a part in ${GAP_DIVISOR.toFixed(3)}: its 12th fret lies ${short.toFixed(2)} mm (${(short / MM_PER_INCH).toFixed(3)} in) nearer the nut and sounds ${flat} cents flat.`;
}

/** What each printed page says, line by line: what it is, how to print it, how to join it to the next. */
export function sheetLines(
  { paper, pages, rulerMm, rulerIn }: FretSheet,
  { number, marks }: SheetPage,
  table: FretTable,
): string[] {
  return [
    `Fret slots at full size, page ${number} of ${pages.length}, ${paper} upright. Scale ${scaleWords(table, 'in')}.`,
    `Print at 100 % and check the ruler before you cut: ${rulerMm} mm and ${rulerIn} in must measure just that.`,
    `Bass side on the left, nut at the top.${seamWords(marks.map(({ name }) => name))}`,
  ];
}

function seamWords(names: string[]): string {
  if (names.length === 0) return '';
  return names.length === 1
    ? ` Lay line ${names[0]} on line ${names[0]} of the page beside it.`
    : ` Lay lines ${names.join(' and ')} on the same lines of the pages beside it.`;
}

/** A slot's place in both units, as it stands beside it on the sheet. */
export function slotOnSheet(fret: number, fromNutMm: number): string {
  return fret === 0 ? 'Nut' : `${fret} · ${slotWords(fromNutMm, 'mm')} mm · ${slotWords(fromNutMm, 'in')} in`;
}

function inlayWords(inlay: Fingerboard['plan']['inlay'], marked: number[]): string {
  const frets = [...new Set(marked)];
  if (inlay === 'none' || frets.length === 0) return 'No inlays on the face.';
  const doubled = frets.filter((fret) => fret % 12 === 0);
  const name = { dots: 'Dots', 'bass-side dots': 'Dots on the bass side', blocks: 'Blocks' }[inlay];
  const twice = doubled.length > 0 ? `, two each at ${listed(doubled)}` : '';
  return `${name} at ${listed(frets)}${twice}.`;
}

function listed(frets: number[]): string {
  return frets.length < 2 ? frets.join('') : `${frets.slice(0, -1).join(', ')} and ${frets.at(-1)}`;
}

function count(number: number, noun: string): string {
  return `${number} ${noun}${number === 1 ? '' : 's'}`;
}

function trimmed(mm: number, unit: FretUnit): string {
  const value = unit === 'in' ? mm / MM_PER_INCH : mm;
  return value.toFixed(3).replace(/\.?0+$/, '');
}
