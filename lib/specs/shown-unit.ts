import type { ShownUnit } from '../craft/measure';

/** A device remembers how it shows lengths in this cookie, so that the first paint is right. */
export const UNIT_COOKIE = 'flitchbook-unit';

export const shownUnits = ['in', 'fraction', 'mm'] as const satisfies readonly ShownUnit[];

/** What a cookie says, or inches for anything else. */
export const shownUnitFrom = (value: string | undefined): ShownUnit =>
  shownUnits.find((unit) => unit === value) ?? 'in';

/** The same thing said in each unit system. */
export type InEachUnit = Record<ShownUnit, string>;

export function inEachUnit(say: (show: ShownUnit) => string): InEachUnit {
  return { in: say('in'), fraction: say('fraction'), mm: say('mm') };
}
