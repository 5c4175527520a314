import { isRefused } from '../craft/doubt';
import { figure } from '../craft/figure';
import { doubtMoisture, emcPercent, moistureWords, relativeHumidityFor } from '../craft/moisture';
import { readMeasure } from '../craft/read-measure';
import { airTrouble, airWords, readAir } from './air';
import type { MeasureLine } from './measure-line';
import { readNumberField } from './number-field';
import type { ShownReading, WoodRoomReading } from './reading';
import { fieldDoubts, nothingRead, worstOf, type PartRead, type TypedReadings } from './typed';

type Parts = Pick<TypedReadings, 'temperature' | 'temperatureUnit' | 'humidity' | 'moisture'>;

/** A wood-room reading from its fields; a unit typed behind the temperature wins over the one chosen. */
export function readWoodRoom(typed: Parts): PartRead {
  if ([typed.temperature, typed.humidity, typed.moisture].every((text) => text.trim() === '')) return nothingRead;
  const { air, doubts: ofAir, missing } = readAir(typed, NO_TEMPERATURE, NO_HUMIDITY);
  const moisture = readNumberField(typed.moisture, ['%']);
  const odd = moisture.value === null ? null : worstOf(doubtMoisture(moisture.value));
  const doubts = { ...ofAir, ...fieldDoubts({ moisture: moisture.doubt ?? odd }) };
  if (isRefused(Object.values(doubts)) || !air) return { reading: null, shown: null, doubts, missing };
  const value: WoodRoomReading = { kind: 'wood_room', ...air, moisturePercent: moisture.value };
  return { reading: { value, itemKey: null }, shown: showWoodRoom(value), doubts, missing };
}

const NO_TEMPERATURE = 'Write the temperature too: the moisture hangs on both.';
const NO_HUMIDITY = 'Write the humidity too: the moisture hangs on both.';

/** Why a wood-room reading cannot be meant, or null. */
export function woodRoomTrouble(value: WoodRoomReading): string | null {
  const odd = value.moisturePercent === null ? [] : doubtMoisture(value.moisturePercent);
  return airTrouble(value) ?? odd.find(({ kind }) => kind === 'wrong')?.sentence ?? null;
}

/**
 * Which air keeps the wood at the moisture it is to have, else at the one it has; null where neither is known, or no air does.
 */
export function holdingWords(air: WoodRoomReading, aimedPercent: number | null): string | null {
  const { temperatureC, moisturePercent } = air;
  const held = aimedPercent ?? moisturePercent;
  if (held === null || held <= 0 || held > emcPercent(temperatureC, 100)) return null;
  const humidity = figure(relativeHumidityFor(held, temperatureC), 0);
  const wood = aimedPercent === null ? 'stays at' : 'comes to';
  return `At ${figure(temperatureC, 1)} °C the wood ${wood} ${moistureWords(held)} in air that is kept at ${humidity} % humidity.`;
}

/** The moisture the spec asks for, in percent, where a line of the stage gives one. */
export function aimedMoisture(lines: readonly MeasureLine[]): number | null {
  const line = lines.find(({ aim, label }) => aim.unit === 'percent' && /moisture/i.test(label));
  const read = line && readMeasure(line.aim.text, line.aim.unit);
  return read?.ok ? read.value : null;
}

/** "21 °C (70 °F), 45 %" and where the wood settles in it, beside what the meter says. @throws RangeError as `emcPercent` */
export function showWoodRoom(value: WoodRoomReading): ShownReading {
  const { temperatureC, relativeHumidityPercent, moisturePercent } = value;
  const settles = moistureWords(emcPercent(temperatureC, relativeHumidityPercent));
  const measured = moisturePercent === null ? '' : `; the meter says ${moistureWords(moisturePercent)}`;
  return {
    kind: 'wood_room',
    label: 'Wood room',
    figures: airWords(value),
    words: `the wood will settle at ${settles}${measured}`,
    standing: null,
    bar: null,
  };
}
