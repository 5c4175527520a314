import { airTrouble } from './air';
import { showBooth } from './booth';
import { coatTrouble, showCoat } from './coat';
import { colourTrouble, showColour } from './colour';
import { lineOfSetup, lineTrouble, showLine, type MeasureLine } from './measure-line';
import { papersTrouble, showPapers } from './papers';
import { colourLine, itemLine, sheetOf, type BenchBuild, type BenchItem } from './plan';
import type { MeasureReading, NewReading, ShownReading } from './reading';
import { showWoodRoom, woodRoomTrouble } from './wood-room';

export type Judged = { ok: true; shown: ShownReading } | { ok: false; message: string };

const STALE =
  'The spec has changed since this was written, and what was measured is no longer in it. Reload the page, look at the readings, and post again.';

/** Whether a reading that arrived can be meant on this build, and what the diary says of it. The same rules as in the form. */
export function judgeReading({ value, itemKey }: NewReading, build: BenchBuild): Judged {
  const item = build.items.find(({ key }) => key === itemKey) ?? null;
  if (itemKey !== null && !item) return refused(STALE);
  switch (value.kind) {
    case 'wood_room':
      return said(woodRoomTrouble(value), () => showWoodRoom(value));
    case 'booth_air':
      return said(airTrouble(value), () => showBooth(value));
    case 'coat':
      return said(coatTrouble(value), () => showCoat(value, build.coats));
    case 'abrasives':
      return said(papersTrouble(value), () => showPapers(value));
    case 'colour': {
      const [line = null] = item ? colourLine(item) : [];
      return said(colourTrouble(value, line), () => showColour(value, line));
    }
    case 'measure':
      return judgeMeasure(value, item, build);
  }
}

function judgeMeasure(value: MeasureReading, item: BenchItem | null, build: BenchBuild): Judged {
  const line = lineOf(value, item, build);
  if (!line) return refused(STALE);
  return said(lineTrouble(value.measured, line), () => showLine({ ...value, name: line.label }, line));
}

function lineOf({ setupLine }: MeasureReading, item: BenchItem | null, build: BenchBuild): MeasureLine | null {
  if (item) return itemLine(item)[0] ?? null;
  const onSheet = setupLine === undefined ? undefined : sheetOf(build).find(({ key }) => key === setupLine);
  return onSheet ? lineOfSetup(onSheet) : null;
}

const refused = (message: string): Judged => ({ ok: false, message });

const said = (trouble: string | null, show: () => ShownReading): Judged =>
  trouble === null ? { ok: true, shown: show() } : refused(trouble);
