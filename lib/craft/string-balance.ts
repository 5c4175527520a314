import { gaugeWords } from './gauges';
import { noteWords } from './notes';
import { listedGauges, unitWeight } from './string-weights';
import { newtons, setTension, stringTensionLb, type SetTension, type StringPlan, type StringTension } from './strings';

/** The tension a player chose for every string, in lb. */
export type TensionBand = { lowLb: number; highLb: number };

export type BalancedString = StringTension & {
  standing: 'below' | 'within' | 'above' | 'no band';
  /** The nearest gauge of the same make that lies in the band, or null. */
  advice: { gaugeThou: number; tensionLb: number } | null;
};

export type StringBalance = Omit<SetTension, 'strings'> & { band: TensionBand | null; strings: BalancedString[] };

export type ChangedString = { before: StringTension; after: StringTension; differenceLb: number; totalLb: number };

/**
 * A set beside the band its player chose: which strings lie below or above it, and the nearest gauge that would bring each in.
 * Refused with a sentence as `setTension` is, and when the band is no band.
 */
export function stringBalance(
  plan: StringPlan,
  band: TensionBand | null,
): { ok: true; balance: StringBalance } | { ok: false; message: string } {
  if (band && !(band.lowLb > 0 && band.highLb > band.lowLb && band.highLb <= 100)) {
    return { ok: false, message: 'The band runs from a lower to a higher tension in lb, such as 16 to 20.' };
  }
  const set = setTension(plan);
  if (!set.ok) return set;
  const strings = set.strings.map((string) => {
    const standing = standingIn(band, string.tensionLb);
    const isOut = standing === 'below' || standing === 'above';
    return { ...string, standing, advice: band && isOut ? nearestInBand(string, band) : null };
  });
  return { ok: true, balance: { band, strings, totalLb: set.totalLb, totalN: set.totalN } };
}

/** What another gauge on one string (numbered from the treble side) does to it and to the whole set. */
export function changeString(
  plan: StringPlan,
  number: number,
  gauge: StringPlan['strings'][number]['gauge'],
): ({ ok: true } & ChangedString) | { ok: false; message: string } {
  const now = setTension(plan);
  if (!now.ok) return now;
  const next = setTension({
    ...plan,
    strings: plan.strings.map((string, i) => (i === number - 1 ? { ...string, gauge } : string)),
  });
  if (!next.ok) return next;
  const [before, after] = [now.strings[number - 1], next.strings[number - 1]];
  if (!before || !after) return { ok: false, message: `There is no string ${number} on this instrument.` };
  return { ok: true, before, after, differenceLb: after.tensionLb - before.tensionLb, totalLb: next.totalLb };
}

/** `A .064 takes B1 from 16.4 to 17.5 lb (78 N), 1.1 lb more, and the set to 113.7 lb (506 N).` */
export function changeWords({ before, after, differenceLb, totalLb }: ChangedString): string {
  const { gauge, note, tensionLb, tensionN } = after;
  const size = Math.abs(differenceLb).toFixed(1);
  const change = size === '0.0' ? 'no more and no less' : `${size} lb ${differenceLb < 0 ? 'less' : 'more'}`;
  const pull = `from ${before.tensionLb.toFixed(1)} to ${tensionLb.toFixed(1)} lb (${Math.round(tensionN)} N)`;
  const set = `the set to ${totalLb.toFixed(1)} lb (${Math.round(newtons(totalLb))} N)`;
  return `A ${gaugeWords(gauge.gaugeThou)} takes ${noteWords(note)} ${pull}, ${change}, and ${set}.`;
}

/** One paragraph on a balance, for below the bars and for a reader who does not see them. */
export function balanceWords({ strings, band, totalLb, totalN }: StringBalance): string {
  const tuning = strings
    .toReversed()
    .map(({ note }) => noteWords(note, false))
    .join(' ');
  const whole = `${totalLb.toFixed(1)} lb (${Math.round(totalN)} N) in all, ${scaleWords(strings)}, ${tuning}.`;
  const between = strings.some(({ isListed }) => !isListed)
    ? 'Some weights are taken between two published gauges.'
    : '';
  return [whole, band ? bandWords(band, strings) : '', between, CARE].filter((part) => part !== '').join(' ');
}

const CARE = 'Change strings one at a time and let the neck settle before touching the truss rod.';

function bandWords(band: TensionBand, strings: BalancedString[]): string {
  const outside = strings.filter(({ standing }) => standing === 'below' || standing === 'above');
  const chosen = `The band is the range chosen, ${band.lowLb} to ${band.highLb} lb.`;
  if (outside.length === 0) return `${chosen} Every string lies in it.`;
  return [chosen, ...outside.map(outsideWords)].join(' ');
}

function outsideWords({ number, note, standing, advice }: BalancedString): string {
  const where = `String ${number}, ${noteWords(note)}, lies ${standing} it`;
  if (!advice) return `${where}.`;
  return `${where}; a ${gaugeWords(advice.gaugeThou)} would bring it to ${advice.tensionLb.toFixed(1)} lb.`;
}

function scaleWords(strings: StringTension[]): string {
  const [treble, bass] = [inches(strings[0]), inches(strings.at(-1))];
  return treble === bass ? `at ${treble} in` : `at ${treble} in on the treble side and ${bass} in on the bass side`;
}

function inches(string: StringTension | undefined): string {
  return (string?.scaleLengthIn ?? 0).toFixed(3).replace(/\.?0+$/, '');
}

function standingIn(band: TensionBand | null, tensionLb: number): BalancedString['standing'] {
  if (!band) return 'no band';
  if (tensionLb < band.lowLb) return 'below';
  return tensionLb > band.highLb ? 'above' : 'within';
}

function nearestInBand(string: StringTension, band: TensionBand): BalancedString['advice'] {
  const { construction, gaugeThou } = string.gauge;
  const near = listedGauges(construction).toSorted((a, b) => Math.abs(a - gaugeThou) - Math.abs(b - gaugeThou));
  for (const other of near) {
    const weight = unitWeight(other, construction);
    if (!weight) continue;
    const tensionLb = stringTensionLb(weight.lbPerIn, string.scaleLengthIn, string.frequencyHz);
    if (standingIn(band, tensionLb) === 'within') return { gaugeThou: other, tensionLb };
  }
  return null;
}
