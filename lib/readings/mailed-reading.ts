import { coatDryFilmUm, UM_PER_MIL } from '../craft/film';
import { figure } from '../craft/figure';
import { lengthWords } from '../craft/measure';
import { celsiusToFahrenheit } from '../craft/moisture';
import type { CoatReading, ReadingValue, ShownReading } from './reading';

export type Units = 'in' | 'mm';

const standings = { within: ', within its tolerance', outside: ', outside its tolerance' };

function filmIn(coat: CoatReading, units: Units): string | null {
  const dryUm = coatDryFilmUm(coat);
  const um = dryUm ?? coat.wetFilmUm;
  if (um === null) return null;
  const film = units === 'mm' ? `${figure(um, 0)} µm` : `${figure(um / UM_PER_MIL, 1)} mil`;
  return `${film} ${dryUm === null ? 'wet' : 'dry'}`;
}

function figuresIn(value: ReadingValue, shown: ShownReading, units: Units): string {
  switch (value.kind) {
    case 'measure':
      return lengthWords(value.measured, units);
    case 'coat':
      return filmIn(value, units) ?? shown.figures;
    case 'booth_air':
    case 'wood_room': {
      const { temperatureC, relativeHumidityPercent } = value;
      const air =
        units === 'mm' ? `${figure(temperatureC, 1)} °C` : `${figure(celsiusToFahrenheit(temperatureC), 0)} °F`;
      return `${air}, ${figure(relativeHumidityPercent, 1)} %`;
    }
    case 'colour':
    case 'abrasives':
      return shown.figures;
  }
}

/**
 * "Nut width: 42.85 mm, within its tolerance": a reading in one line for a mail, in the unit system of its reader and no
 * other. What the diary says besides is left to the diary, because it names limits in the unit they were written in.
 */
export function mailedReading(value: ReadingValue, shown: ShownReading, units: Units): string {
  const standing = shown.standing === null ? '' : standings[shown.standing];
  return `${shown.label}: ${figuresIn(value, shown, units)}${standing}`;
}
