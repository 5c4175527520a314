import { benchNotes } from './notes';
import type { StageKey } from './pictures';
import { readMeasure, type Measure } from '@/lib/craft/measure';
import type { Unit } from '@/lib/craft/units';
import { sheetOf, type BenchBuild, type BenchItem } from '@/lib/readings/plan';
import type { NewReading } from '@/lib/readings/reading';

/** Which of a stage's notes its measures stand in; the last one where nothing is said. */
const measuredIn: Partial<Record<StageKey, number>> = { machining: 0, 'neck-board': 1 };

export type DemoPage = {
  orderIndex: number;
  stageKey: StageKey;
  /** Place of the page's words among the notes of its stage, and whether the stage has no other page. */
  note: number;
  isOnly: boolean;
};

/** An item that came out wrong, by how many tolerances it is off. */
export type Miss = { itemKey: string; share: number };

const dryAir: [number, number, number][] = [
  [21, 47, 11.6],
  [21.5, 46, 11],
];
const room: [number, number, number][] = [
  [21, 45, 10.8],
  [20.5, 44, 9.4],
  [21, 43.5, 8.4],
];

/** What was measured for one page of a build, by its stage and its words. */
export function measuredOn(page: DemoPage, bench: BenchBuild, miss: Miss | null): NewReading[] {
  const measuredNote = measuredIn[page.stageKey] ?? benchNotes[page.stageKey].length - 1;
  const isMeasured = page.isOnly || page.note === measuredNote;
  const here = bench.items.filter(({ provenAt }) => provenAt === page.stageKey);
  return [...workReadings(page, here), ...(isMeasured ? measuresOf(page, here, bench, miss) : [])];
}

function workReadings({ stageKey, note, orderIndex }: DemoPage, here: BenchItem[]): NewReading[] {
  if (stageKey === 'lumber') return airOf(dryAir[note], orderIndex);
  if (stageKey === 'wood-room') return airOf(room[note], orderIndex);
  if (stageKey === 'body-joint' && note === 1) return [papers('P120', 'P150', 'P180', 'P220', 'P320')];
  if (stageKey === 'sand-buff' && note === 0) return [papers('P800', 'P1000', 'P1200', 'P1500')];
  if (stageKey !== 'colour-clear') return [];
  if (note === 0) return [booth(orderIndex), coat(1, 'Tinted lacquer', 62, 18), ...here.flatMap(colourOf)];
  if (note === 1) return [coat(2, 'Clear lacquer', 118, 24), coat(3, 'Clear lacquer', 125, 24)];
  return [coat(4, 'Clear lacquer', 127, 24), coat(5, 'Clear lacquer', 130, 24)];
}

function airOf(found: [number, number, number] | undefined, orderIndex: number): NewReading[] {
  if (!found) return [];
  const [temperatureC, humidity, moisturePercent] = found;
  const relativeHumidityPercent = humidity + (orderIndex % 3) - 1;
  return [{ itemKey: null, value: { kind: 'wood_room', temperatureC, relativeHumidityPercent, moisturePercent } }];
}

const booth = (orderIndex: number): NewReading => ({
  itemKey: null,
  value: { kind: 'booth_air', temperatureC: 22, relativeHumidityPercent: 47 + (orderIndex % 4) },
});

const papers = (...grades: string[]): NewReading => ({ itemKey: null, value: { kind: 'abrasives', grades } });

const coat = (coatNumber: number, product: string, wetFilmUm: number, volumeSolidsPercent: number): NewReading => ({
  itemKey: null,
  value: { kind: 'coat', product, coatNumber, wetFilmUm, volumeSolidsPercent, dryFilmUm: null },
});

/** A touch lighter than the sample: near enough for its limit. */
function colourOf({ key, colour }: BenchItem): NewReading[] {
  if (!colour) return [];
  const { l, a, b, illuminant } = colour;
  return [
    { itemKey: key, value: { kind: 'colour', l: tenth(l + 0.7), a: tenth(a + 0.5), b: tenth(b - 0.6), illuminant } },
  ];
}

const tenth = (value: number) => Math.round(value * 10) / 10;
const shares = [0.2, -0.4, 0, 0.5, -0.1, 0.3, -0.6];

function measuresOf(page: DemoPage, here: BenchItem[], bench: BenchBuild, miss: Miss | null): NewReading[] {
  const items = here.flatMap((item, index) => {
    if (!item.aim) return [];
    const share = item.key === miss?.itemKey ? miss.share : (shares[(page.orderIndex + index) % shares.length] ?? 0);
    const text = cameOutAs(item.aim, item.tolerance?.plus ?? null, share);
    const value = { kind: 'measure', name: item.label, measured: { text, unit: item.aim.unit } } as const;
    return [{ itemKey: item.key, value }];
  });
  return page.stageKey === 'hardware-setup' ? [...items, ...intonation(bench, page.orderIndex)] : items;
}

function intonation(bench: BenchBuild, orderIndex: number): NewReading[] {
  const lines = sheetOf(bench).filter(({ key }) => key.startsWith('intonation'));
  return lines.map(({ key, label, aim }, index) => {
    const text = String(((orderIndex + index * 2) % 5) - 2);
    return {
      itemKey: null,
      value: { kind: 'measure', name: label, measured: { text, unit: aim.unit }, setupLine: key },
    };
  });
}

const decimals: Partial<Record<Unit, number>> = { in: 3, mm: 2, '64ths': 1, deg: 1, kohm: 2 };

/** A value as a caliper shows it, so many tolerances off its aim. Counts and fractions come out as they were asked for. */
function cameOutAs(aim: Measure, tolerance: string | null, share: number): string {
  const [aimed, side] = [readMeasure(aim.text, aim.unit), tolerance === null ? null : readMeasure(tolerance, aim.unit)];
  if (!aimed.ok || !side?.ok || aim.text.includes('/')) return aim.text;
  return (aimed.value + share * side.value).toFixed(decimals[aim.unit] ?? 0);
}
