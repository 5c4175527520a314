import { readBooth } from './booth';
import { readCoat } from './coat';
import { readColour } from './colour';
import { readLine } from './measure-line';
import { readPapers } from './papers';
import type { ReadingPlan } from './plan';
import type { NewReading, ShownReading } from './reading';
import { nothingRead, type FieldDoubts, type PartRead, type TypedReadings } from './typed';
import { readWoodRoom } from './wood-room';

/** Everything the fields of one stage come to, in the order of the form. */
export type ReadFields = {
  readings: NewReading[];
  shown: ShownReading[];
  doubts: FieldDoubts;
  missing: Record<string, string>;
};

/** Reads the fields that belong to the stage; what was typed for another stage is left where it is. */
export function readTyped(typed: TypedReadings, plan: ReadingPlan): ReadFields {
  const parts: PartRead[] = [
    plan.hasWoodRoom ? readWoodRoom(typed) : nothingRead,
    plan.hasBooth ? readBooth(typed) : nothingRead,
    plan.hasCoat ? readCoat(typed, plan.coatsBefore) : nothingRead,
    plan.colours ? readColour(typed, colourChosen(plan.colours, typed)) : nothingRead,
    plan.hasPapers ? readPapers(typed.papers, plan.work) : nothingRead,
    ...plan.lines.map((line) => readLine(typed.measures[line.key] ?? '', line)),
  ];
  return {
    readings: parts.flatMap(({ reading }) => reading ?? []),
    shown: parts.flatMap(({ shown }) => shown ?? []),
    doubts: Object.assign({}, ...parts.map(({ doubts }) => doubts)),
    missing: Object.assign({}, ...parts.map(({ missing }) => missing)),
  };
}

export const colourChosen = (colours: NonNullable<ReadingPlan['colours']>, { colourItem }: TypedReadings) =>
  colours.find(({ itemKey }) => itemKey === colourItem) ?? colours[0] ?? null;

/** How far the readings of a draft are, kept with it so that it can be sent without reading the fields again. */
export type ReadingStand = {
  /** The stage they were read for. */
  stageId: string;
  readings: NewReading[];
  /** Something typed cannot be meant, or a field is missing: the entry waits. */
  isRefused: boolean;
  outsideCount: number;
};

export function standOf(stageId: string, { readings, shown, doubts, missing }: ReadFields): ReadingStand {
  const isWrong = Object.values(doubts).some(({ kind }) => kind === 'wrong');
  return {
    stageId,
    readings,
    isRefused: isWrong || Object.keys(missing).length > 0,
    outsideCount: shown.filter(({ standing }) => standing === 'outside').length,
  };
}
