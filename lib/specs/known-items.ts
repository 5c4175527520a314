import type { Quantity } from '../craft/measure';

/**
 * Keys that drawings, tables and set-up sheets look for. A document may lack any of them: what is computed from one is then
 * left out. Set-up keys are those of lib/craft/set-up.ts, so that a reading finds its item.
 */
export const knownItems = {
  scaleLength: 'scale_length',
  bassScaleLength: 'bass_scale_length',
  perpendicularFret: 'perpendicular_fret',
  fretCount: 'fret_count',
  nutWidth: 'nut_width',
  lastFretWidth: 'last_fret_width',
  inlay: 'inlay',
  stringCount: 'string_count',
  tuning: 'tuning',
  gauges: 'gauges',
  tensionLow: 'tension_low',
  tensionHigh: 'tension_high',
} as const;

const quantities: Record<string, Quantity> = {
  scale_length: 'scale length',
  bass_scale_length: 'scale length',
  nut_width: 'nut width',
  last_fret_width: 'fingerboard width',
  radius: 'fingerboard radius',
  relief: 'relief',
  action_treble: 'action',
  action_bass: 'action',
};

/** What a measure is a measure of, by its key, so that a number which cannot be meant is noticed. */
export function quantityOf(key: string): Quantity | undefined {
  if (/^pickup_\w+_(treble|bass)$/.test(key)) return 'pickup height';
  if (/^nut_slot_\d+$/.test(key)) return 'string height at the first fret';
  return Object.hasOwn(quantities, key) ? quantities[key] : undefined;
}
