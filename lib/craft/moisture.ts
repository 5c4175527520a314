import { ask, wrong, type Doubt } from './doubt';
import { figure } from './figure';

/** What the published table covers; beyond it the equation is extrapolated. */
export const EMC_TABLE = { lowC: -1.1, highC: 132.2, lowPercent: 5, highPercent: 95 } as const;

/** No wood room, kiln or case in transit is outside this. */
const SANE_C = { low: -40, high: 150 };

/** From here up a Celsius figure is more likely a Fahrenheit one: a warm room is 45 °F to 110 °F. */
const HOT_ROOM_C = 45;

/** Up to here a Fahrenheit figure is more likely a Celsius one. */
const COLD_ROOM_F = 35;

export const fahrenheitToCelsius = (temperatureF: number) => ((temperatureF - 32) * 5) / 9;
export const celsiusToFahrenheit = (temperatureC: number) => (temperatureC * 9) / 5 + 32;

/**
 * Equilibrium moisture content in percent of dry weight that wood tends to in this air.
 * USDA Forest Products Laboratory, Wood Handbook, FPL-GTR-282 (2021), Eq. (4-5), p. 4-3, Celsius form. The Handbook's own
 * table rounds to 0.1, which is finer than wood is: species, specimens and the way the wood came (drying or wetting) differ.
 * @throws RangeError when a figure is not finite or the relative humidity is outside 0 to 100
 */
export function emcPercent(temperatureC: number, relativeHumidityPercent: number): number {
  if (!Number.isFinite(temperatureC)) throw new RangeError(`A temperature is a number; got ${temperatureC}.`);
  if (!(relativeHumidityPercent >= 0 && relativeHumidityPercent <= 100)) {
    throw new RangeError(`Relative humidity runs from 0 to 100 %; got ${relativeHumidityPercent}.`);
  }
  const t = temperatureC;
  const h = relativeHumidityPercent / 100;
  const w = 349 + 1.29 * t + 0.0135 * t ** 2;
  const kh = (0.805 + 0.000736 * t - 0.00000273 * t ** 2) * h;
  const k1 = 6.27 - 0.00938 * t - 0.000303 * t ** 2;
  const k2 = 1.91 + 0.0407 * t - 0.000293 * t ** 2;
  const dissolved = kh / (1 - kh);
  const bound = (k1 * kh + 2 * k1 * k2 * kh ** 2) / (1 + k1 * kh + k1 * k2 * kh ** 2);
  return (1800 / w) * (dissolved + bound);
}

/**
 * Relative humidity in percent at which wood settles at this moisture: the inverse of `emcPercent`, by bisection.
 * @throws RangeError when no humidity from 0 to 100 % gives this moisture
 */
export function relativeHumidityFor(moisturePercent: number, temperatureC: number): number {
  const most = emcPercent(temperatureC, 100);
  if (!(moisturePercent >= 0 && moisturePercent <= most)) {
    throw new RangeError(
      `At ${temperatureC} °C wood settles between 0 and ${figure(most, 1)} %; got ${moisturePercent}.`,
    );
  }
  let low = 0;
  let high = 100;
  for (let step = 0; step < 60; step++) {
    const middle = (low + high) / 2;
    if (emcPercent(temperatureC, middle) < moisturePercent) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

/** "9.3 %": one decimal, since the equation is no better than that. */
export const moistureWords = (moisturePercent: number) => `${figure(moisturePercent, 1)} %`;

/** What is odd about a temperature as typed, with the unit it was typed in. */
export function doubtTemperature(temperature: number, unit: 'C' | 'F'): Doubt[] {
  if (!Number.isFinite(temperature)) return [wrong('Write the temperature as a number.')];
  const typed = `${figure(temperature, 1)} °${unit}`;
  const temperatureC = unit === 'C' ? temperature : fahrenheitToCelsius(temperature);
  if (temperatureC < SANE_C.low || temperatureC > SANE_C.high) {
    return [wrong(`${typed} cannot be meant for a room or a kiln. Check the figure and its unit.`)];
  }
  const doubts: Doubt[] = [];
  if (unit === 'C' && temperature >= HOT_ROOM_C) {
    const other = figure(fahrenheitToCelsius(temperature), 1);
    doubts.push(
      ask(`${typed} is hot for a room. If the thermometer shows Fahrenheit, choose °F: it is then ${other} °C.`),
    );
  }
  if (unit === 'F' && temperature <= COLD_ROOM_F) {
    const read = figure(temperatureC, 1);
    doubts.push(ask(`${typed} is ${read} °C, cold for a room. If the thermometer shows Celsius, choose °C.`));
  }
  if (temperatureC < EMC_TABLE.lowC || temperatureC > EMC_TABLE.highC) {
    doubts.push(ask('The published table runs from -1.1 to 132.2 °C; beyond it the moisture shown is extrapolated.'));
  }
  return doubts;
}

/** What is odd about a relative humidity in percent as typed. */
export function doubtHumidity(relativeHumidityPercent: number): Doubt[] {
  const rh = relativeHumidityPercent;
  if (!Number.isFinite(rh)) return [wrong('Write the relative humidity as a number of percent, such as 45.')];
  if (rh < 0 || rh > 100) return [wrong(`Relative humidity runs from 0 to 100 %; ${figure(rh, 1)} cannot be meant.`)];
  if (rh > 0 && rh < 1) {
    const percent = figure(rh * 100, 1);
    return [wrong(`${figure(rh, 3)} is less than one percent. If ${percent} % is meant, write ${percent}.`)];
  }
  if (rh < EMC_TABLE.lowPercent || rh > EMC_TABLE.highPercent) {
    return [ask('The published table runs from 5 to 95 % humidity; beyond it the moisture shown is extrapolated.')];
  }
  return [];
}

/** What is odd about a moisture content in percent, as read from a meter. */
export function doubtMoisture(moisturePercent: number): Doubt[] {
  if (!Number.isFinite(moisturePercent)) return [wrong('Write the moisture as a number of percent, such as 7.5.')];
  if (moisturePercent < 0) return [wrong('Wood cannot hold less than no water. Check the sign.')];
  if (moisturePercent > 0 && moisturePercent < 1) {
    const percent = figure(moisturePercent * 100, 1);
    return [
      wrong(`${figure(moisturePercent, 3)} is less than one percent. If ${percent} % is meant, write ${percent}.`),
    ];
  }
  if (moisturePercent > 200) return [wrong('No wood holds that much water. Check the figure.')];
  if (moisturePercent > 30) return [ask('Above 30 % the wood is green: it does not move until it dries below that.')];
  return [];
}
