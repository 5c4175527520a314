import { isRefused, wrong, type Doubt } from '../craft/doubt';
import { figure } from '../craft/figure';
import {
  celsiusToFahrenheit,
  doubtHumidity,
  doubtMoisture,
  doubtTemperature,
  emcPercent,
  fahrenheitToCelsius,
  moistureWords,
} from '../craft/moisture';
import { readNumberField } from './number-field';
import type { ShownReading, WoodRoomReading } from './reading';
import { fieldDoubts, nothingRead, worstOf, type PartRead, type TypedReadings } from './typed';

/** What a wood room people work in can be; a kiln is none. Sanity, not advice. */
const ROOM_C = { low: -10, high: 45 };

/** What is odd about a wood room's temperature. Outside what a room can be it is refused, with the other unit named. */
export function doubtRoomTemperature(temperature: number, unit: 'C' | 'F'): Doubt | null {
  const doubts = doubtTemperature(temperature, unit);
  const temperatureC = unit === 'C' ? temperature : fahrenheitToCelsius(temperature);
  if (isRefused(doubts) || (temperatureC >= ROOM_C.low && temperatureC < ROOM_C.high)) return worstOf(doubts);
  return wrong(doubts[0]?.sentence ?? `${figure(temperature, 1)} °${unit} cannot be meant for a wood room.`);
}

type Parts = Pick<TypedReadings, 'temperature' | 'temperatureUnit' | 'humidity' | 'moisture'>;

/** A wood-room reading from its fields; a unit typed behind the temperature wins over the one chosen. */
export function readWoodRoom(typed: Parts): PartRead {
  const read = {
    temperature: readNumberField(typed.temperature, ['°c', '°f', 'c', 'f']),
    humidity: readNumberField(typed.humidity, ['%']),
    moisture: readNumberField(typed.moisture, ['%']),
  };
  const unit = unitOf(read.temperature.behind) ?? typed.temperatureUnit;
  const [temperature, humidity, moisture] = [read.temperature.value, read.humidity.value, read.moisture.value];
  if ([typed.temperature, typed.humidity, typed.moisture].every((text) => text.trim() === '')) return nothingRead;
  const doubts = fieldDoubts({
    temperature: read.temperature.doubt ?? (temperature === null ? null : doubtRoomTemperature(temperature, unit)),
    humidity: read.humidity.doubt ?? (humidity === null ? null : worstOf(doubtHumidity(humidity))),
    moisture: read.moisture.doubt ?? (moisture === null ? null : worstOf(doubtMoisture(moisture))),
  });
  const missing = {
    ...(typed.temperature.trim() === '' && { temperature: 'Write the temperature too: the moisture hangs on both.' }),
    ...(typed.humidity.trim() === '' && { humidity: 'Write the humidity too: the moisture hangs on both.' }),
  };
  if (isRefused(Object.values(doubts)) || temperature === null || humidity === null)
    return { reading: null, shown: null, doubts, missing };
  const value: WoodRoomReading = {
    kind: 'wood_room',
    temperatureC: rounded(unit === 'C' ? temperature : fahrenheitToCelsius(temperature)),
    relativeHumidityPercent: humidity,
    moisturePercent: moisture,
  };
  return { reading: { value, itemKey: null }, shown: showWoodRoom(value), doubts, missing };
}

const unitOf = (behind: string) => (behind.endsWith('f') ? 'F' : behind.endsWith('c') ? 'C' : null);
const rounded = (temperatureC: number) => Math.round(temperatureC * 100) / 100;

/** Why a wood-room reading cannot be meant, or null. */
export function woodRoomTrouble(value: WoodRoomReading): string | null {
  const doubts = [
    doubtRoomTemperature(value.temperatureC, 'C'),
    ...doubtHumidity(value.relativeHumidityPercent),
    ...(value.moisturePercent === null ? [] : doubtMoisture(value.moisturePercent)),
  ].filter((doubt) => doubt !== null);
  return doubts.find(({ kind }) => kind === 'wrong')?.sentence ?? null;
}

/** "21 °C (70 °F), 45 %" and where the wood settles in it, beside what the meter says. @throws RangeError as `emcPercent` */
export function showWoodRoom(value: WoodRoomReading): ShownReading {
  const { temperatureC, relativeHumidityPercent, moisturePercent } = value;
  const settles = moistureWords(emcPercent(temperatureC, relativeHumidityPercent));
  const measured = moisturePercent === null ? '' : `; the meter says ${moistureWords(moisturePercent)}`;
  return {
    kind: 'wood_room',
    label: 'Wood room',
    figures: `${figure(temperatureC, 1)} °C (${figure(celsiusToFahrenheit(temperatureC), 0)} °F), ${figure(relativeHumidityPercent, 1)} %`,
    words: `the wood will settle at ${settles}${measured}`,
    standing: null,
    bar: null,
  };
}
