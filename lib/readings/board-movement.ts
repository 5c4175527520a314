import { readMeasure } from '../craft/measure';
import type { Movement } from '../craft/materials';
import { expectedMovement, type ExpectedMovement } from '../craft/movement';
import { inUnit, isLengthUnit } from '../craft/units';
import { valueOf } from '../craft/fractions';
import type { MaterialItem, MeasureItem, SpecDocument, SpecGroup } from '../specs/document';
import type { Point } from './series';

/** A board of the spec whose wood and width are named. */
export type Board = { label: string; materialKey: string; widthLabel: string; widthMm: number };

/** Groups with boards, and where their widths stand: neck and fingerboard are as wide as each other. */
const widthGroups: [SpecGroup, SpecGroup[]][] = [
  ['body', ['body']],
  ['neck', ['neck', 'fingerboard']],
  ['fingerboard', ['fingerboard']],
];

/** The boards whose movement can be told: a wood of a group, and the widest width that the group names. */
export function boardsOf({ items }: SpecDocument): Board[] {
  return widthGroups.flatMap(([group, widthsIn]) => {
    const here = items.filter((item) => item.group === group);
    const woods = here.filter((item): item is MaterialItem => item.kind === 'material' && item.materialKey !== null);
    const [widest] = items
      .filter((item) => widthsIn.includes(item.group))
      .flatMap(widthOf)
      .sort((a, b) => b.widthMm - a.widthMm);
    if (!widest) return [];
    return woods.flatMap(({ label, materialKey }) => (materialKey === null ? [] : [{ label, materialKey, ...widest }]));
  });
}

function widthOf(item: SpecDocument['items'][number]): { widthLabel: string; widthMm: number }[] {
  if (item.kind !== 'measure' || !isWidth(item)) return [];
  const read = readMeasure(item.aim.text, item.aim.unit);
  if (!read.ok || !isLengthUnit(read.unit)) return [];
  return [{ widthLabel: item.label, widthMm: valueOf(inUnit(read.exact, read.unit, 'mm')) }];
}

const isWidth = ({ label }: MeasureItem) => /\bwidth\b/i.test(label);

export type BoardMovement = { radial: ExpectedMovement | null; tangential: ExpectedMovement | null };

/**
 * How far a board has moved between the first moisture and the last, in millimetres, if it was sawn on the quarter and if it
 * was sawn flat; null with fewer than two readings or where the wood's movement is not known.
 */
export function movementBetween(board: Board, wood: Movement | null, moisture: Point[]): BoardMovement | null {
  const [first] = moisture;
  const last = moisture.at(-1);
  if (!wood || !first || !last || first === last) return null;
  const step = { dimension: board.widthMm, fromPercent: first.value, toPercent: last.value };
  return { radial: expectedMovement(wood, 'radial', step), tangential: expectedMovement(wood, 'tangential', step) };
}
