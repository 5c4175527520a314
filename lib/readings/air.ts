import { isRefused, wrong, type Doubt } from '../craft/doubt';
import { figure } from '../craft/figure';
import { celsiusToFahrenheit, doubtHumidity, doubtTemperature, fahrenheitToCelsius } from '../craft/moisture';
import { readNumberField } from './number-field';
import type { Air } from './reading';
import { fieldDoubts, worstOf, type FieldDoubts, type TypedReadings } from './typed';

/** What a room people work in can be; a kiln is none. Sanity, not advice. */
const ROOM_C = { low: -10, high: 45 };

/** What is odd about a room's temperature. Outside what a room can be it is refused, with the other unit named. */
function doubtRoomTemperature(temperature: number, unit: 'C' | 'F'): Doubt | null {
  const doubts = doubtTemperature(temperature, unit);
  const temperatureC = unit === 'C' ? temperature : fahrenheitToCelsius(temperature);
  if (isRefused(doubts) || (temperatureC >= ROOM_C.low && temperatureC < ROOM_C.high)) return worstOf(doubts);
  return wrong(doubts[0]?.sentence ?? `${figure(temperature, 1)} °${unit} cannot be meant for a room people work in.`);
}

type Parts = Pick<TypedReadings, 'temperature' | 'temperatureUnit' | 'humidity'>;
export type AirRead = { air: Air | null; doubts: FieldDoubts; missing: Record<string, string> };

/**
 * The air of a room from its fields; a unit typed behind the temperature wins over the one chosen. The two sentences are said
 * where one of the figures is missing.
 */
export function readAir(typed: Parts, noTemperature: string, noHumidity: string): AirRead {
  const temperature = readNumberField(typed.temperature, ['°c', '°f', 'c', 'f']);
  const humidity = readNumberField(typed.humidity, ['%']);
  const unit = unitOf(temperature.behind) ?? typed.temperatureUnit;
  const [degrees, percent] = [temperature.value, humidity.value];
  const doubts = fieldDoubts({
    temperature: temperature.doubt ?? (degrees === null ? null : doubtRoomTemperature(degrees, unit)),
    humidity: humidity.doubt ?? (percent === null ? null : worstOf(doubtHumidity(percent))),
  });
  const missing = {
    ...(typed.temperature.trim() === '' && { temperature: noTemperature }),
    ...(typed.humidity.trim() === '' && { humidity: noHumidity }),
  };
  if (degrees === null || percent === null) return { air: null, doubts, missing };
  const temperatureC = hundredths(unit === 'C' ? degrees : fahrenheitToCelsius(degrees));
  return { air: { temperatureC, relativeHumidityPercent: percent }, doubts, missing };
}

const unitOf = (behind: string) => (behind.endsWith('f') ? 'F' : behind.endsWith('c') ? 'C' : null);
const hundredths = (temperatureC: number) => Math.round(temperatureC * 100) / 100;

/** Why the air of a room cannot be meant, or null. */
export function airTrouble({ temperatureC, relativeHumidityPercent }: Air): string | null {
  const doubts = [doubtRoomTemperature(temperatureC, 'C'), ...doubtHumidity(relativeHumidityPercent)];
  return doubts.find((doubt) => doubt?.kind === 'wrong')?.sentence ?? null;
}

/** "21 °C (70 °F), 45 %" */
export function airWords({ temperatureC, relativeHumidityPercent }: Air): string {
  const fahrenheit = figure(celsiusToFahrenheit(temperatureC), 0);
  return `${figure(temperatureC, 1)} °C (${fahrenheit} °F), ${figure(relativeHumidityPercent, 1)} %`;
}
