import type { Measure } from '../craft/measure';
import { setupLines, type SetupLine } from '../craft/set-up';
import type { AimedColour, SpecItem, Tolerance } from '../specs/document';
import { knownItems } from '../specs/known-items';
import type { Work } from '../work';
import type { ColourLine } from './colour';
import { lineOfItem, lineOfSetup, type MeasureLine } from './measure-line';
import type { CoatReading } from './reading';

/** What the bench needs to know of a spec item. */
export type BenchItem = {
  key: string;
  label: string;
  kind: SpecItem['kind'];
  aim: Measure | null;
  tolerance: Tolerance | null;
  colour: AimedColour | null;
  provenAt: string | null;
};

export function benchItemOf(item: SpecItem): BenchItem {
  const { key, label, kind, provenAt } = item;
  return {
    key,
    label,
    kind,
    provenAt,
    aim: item.kind === 'measure' ? item.aim : null,
    tolerance: item.kind === 'measure' ? item.tolerance : null,
    colour: item.kind === 'look' ? item.colour : null,
  };
}

/** What of a build decides its readings. */
export type BenchBuild = {
  items: BenchItem[];
  scaleLengthIn: number;
  /** Coats that are in the diary already, oldest first. */
  coats: CoatReading[];
  /** When the last of them was put on, in milliseconds since 1970; null before the first. */
  lastCoatAtMs: number | null;
};

export type BenchStage = { key: string; work: Work };

/** Which readings an entry of a stage can carry. */
export type ReadingPlan = {
  work: Work;
  hasWoodRoom: boolean;
  hasBooth: boolean;
  hasCoat: boolean;
  hasPapers: boolean;
  colours: ColourLine[] | null;
  lines: MeasureLine[];
  coatsBefore: CoatReading[];
  lastCoatAtMs: number | null;
};

/** From this scale on an instrument is set up as a bass. */
const BASS_SCALE_IN = 30;

/**
 * The readings of a stage: those of its kind of work, and the measures of the spec that this stage is expected to show. A
 * line of the set-up sheet that the spec has too follows the spec.
 */
export function planReadings({ key, work }: BenchStage, build: BenchBuild): ReadingPlan {
  const here = build.items.filter(({ provenAt }) => provenAt === key);
  const sheet = work === 'setup' ? sheetOf(build) : [];
  const ofSpec = here.flatMap((item) => itemLine(item, sheet));
  const ofSheet = sheet.filter((line) => !here.some((item) => item.key === line.key)).map(lineOfSetup);
  return {
    work,
    hasWoodRoom: work === 'wood',
    hasBooth: work === 'finish',
    hasCoat: work === 'finish',
    hasPapers: work === 'body' || work === 'buffing',
    colours: work === 'finish' ? here.flatMap(colourLine) : null,
    lines: [...ofSpec, ...ofSheet],
    coatsBefore: build.coats,
    lastCoatAtMs: build.lastCoatAtMs,
  };
}

export const hasReadings = ({ hasWoodRoom, hasBooth, hasCoat, hasPapers, colours, lines }: ReadingPlan) =>
  hasWoodRoom || hasBooth || hasCoat || hasPapers || colours !== null || lines.length > 0;

/** The line of one item, wherever in the route it is measured; none for an item that is no measure. */
export function itemLine(item: BenchItem, sheet: readonly SetupLine[] = []): MeasureLine[] {
  if (!item.aim) return [];
  const how = sheet.find((line) => line.key === item.key)?.how ?? null;
  return [lineOfItem({ ...item, aim: item.aim }, how)];
}

export const colourLine = ({ key, label, colour }: BenchItem): ColourLine[] =>
  colour ? [{ itemKey: key, label, aim: colour }] : [];

/** The set-up sheet of a build, by its strings as the spec counts them, else those of a usual guitar or bass. */
export function sheetOf({ items, scaleLengthIn }: Pick<BenchBuild, 'items' | 'scaleLengthIn'>): SetupLine[] {
  const isBass = scaleLengthIn >= BASS_SCALE_IN;
  const counted = Number(items.find(({ key }) => key === knownItems.stringCount)?.aim?.text);
  const stringCount = Number.isInteger(counted) && counted >= 1 && counted <= 18 ? counted : isBass ? 4 : 6;
  return setupLines({
    instrument: isBass ? 'bass' : 'guitar',
    stringCount,
    plainCount: isBass ? 0 : Math.min(3, stringCount),
    pickups: ['neck', 'bridge'],
  });
}
