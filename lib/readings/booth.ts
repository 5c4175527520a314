import { isRefused } from '../craft/doubt';
import type { BoothReading, ShownReading } from './reading';
import { nothingRead, type PartRead, type TypedReadings } from './typed';
import { airWords, readAir } from './air';

type Parts = Pick<TypedReadings, 'temperature' | 'temperatureUnit' | 'humidity'>;

/** The air of the spray booth from its fields: the same as those of the wood room. */
export function readBooth(typed: Parts): PartRead {
  if (typed.temperature.trim() === '' && typed.humidity.trim() === '') return nothingRead;
  const { air, doubts, missing } = readAir(typed, 'Write the temperature too.', 'Write the humidity too.');
  if (isRefused(Object.values(doubts)) || !air) return { reading: null, shown: null, doubts, missing };
  const value: BoothReading = { kind: 'booth_air', ...air };
  return { reading: { value, itemKey: null }, shown: showBooth(value), doubts, missing };
}

/** "22 °C (72 °F), 48 %". What air a product may be put on in stands on its data sheet. */
export function showBooth(value: BoothReading): ShownReading {
  return { kind: 'booth_air', label: 'Spray booth', figures: airWords(value), words: '', standing: null, bar: null };
}
