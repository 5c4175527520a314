import { coatDryFilmUm } from '../craft/film';
import { emcPercent } from '../craft/moisture';
import type { CoatReading, ReadingValue, ShownReading } from './reading';

/** A reading with the instant its entry is dated, in milliseconds since 1970. */
export type TimedReading = { takenAt: number; value: ReadingValue; shown: ShownReading | null };

export type Point = { atMs: number; value: number };

/** The readings of one build over time. A series without points has nothing to draw. */
export type ReadingSeries = {
  /** What the meter said, percent of dry weight. */
  moisture: Point[];
  /** Where the wood would settle in the air that was measured, percent. */
  settles: Point[];
  /** Dry film of all coats so far, micrometres. A coat without figures adds nothing. */
  film: Point[];
  coatsWithoutFigures: number;
  /** Colour difference from the approved sample, and the limit it was measured against, by what was measured. */
  colours: { label: string; limitDeltaE: number; points: Point[] }[];
};

/** Sorts readings, oldest first, into what is drawn over time. What cannot be computed is left out. */
export function seriesOf(readings: TimedReading[]): ReadingSeries {
  const air = readings.flatMap(({ takenAt, value }) =>
    value.kind === 'wood_room' ? [{ atMs: takenAt, ...value }] : [],
  );
  const coats = readings.flatMap(({ takenAt, value }) =>
    value.kind === 'coat' ? [{ atMs: takenAt, filmUm: filmUmOf(value) }] : [],
  );
  return {
    moisture: air.flatMap(({ atMs, moisturePercent }) =>
      moisturePercent === null ? [] : [{ atMs, value: moisturePercent }],
    ),
    settles: air.flatMap(({ atMs, temperatureC, relativeHumidityPercent: humidity }) =>
      humidity >= 0 && humidity <= 100 ? [{ atMs, value: emcPercent(temperatureC, humidity) }] : [],
    ),
    film: totals(coats.flatMap(({ atMs, filmUm }) => (filmUm === null ? [] : [{ atMs, value: filmUm }]))),
    coatsWithoutFigures: coats.filter(({ filmUm }) => filmUm === null).length,
    colours: coloursOf(readings),
  };
}

const filmUmOf = (coat: CoatReading) => coatDryFilmUm(coat);

function totals(points: Point[]): Point[] {
  let total = 0;
  return points.map(({ atMs, value }) => ({ atMs, value: (total += value) }));
}

/** Differences are those that were computed when the colour was read, against the sample of then. */
function coloursOf(readings: TimedReading[]): ReadingSeries['colours'] {
  const series = new Map<string, ReadingSeries['colours'][number]>();
  for (const { takenAt, value, shown } of readings) {
    if (value.kind !== 'colour' || !shown?.bar) continue;
    const { label, bar } = shown;
    const known = series.get(label) ?? { label, limitDeltaE: bar.high, points: [] };
    series.set(label, {
      label,
      limitDeltaE: bar.high,
      points: [...known.points, { atMs: takenAt, value: bar.value }],
    });
  }
  return [...series.values()];
}
