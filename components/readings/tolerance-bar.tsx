import { clsx } from 'clsx';
import { figure } from '@/lib/craft/figure';

type ToleranceBarProps = {
  value: number;
  /** Written behind the figures; empty for a plain number. */
  unit: string;
  /** The tolerance, both ends allowed. A side that is left out is open: a limit has only a `high`. */
  band: { low?: number; high?: number };
  aim?: number;
  /** What is measured, to a screen reader where the words beside the bar do not say it. */
  label?: string;
  /** The figures in words; made from value, aim and band when left out. */
  words?: string;
  decimals?: number;
  className?: string;
};

/** How much of the bar the band takes; the rest shows how far off a value is. */
const BAND_SHARE = 0.5;

/**
 * A reading as a short bar: the tolerance as a band, the aim as a notch, the value as a stroke, the figures in words beside
 * it. A value off the bar stands at its end with an arrow. Positions are SVG attributes, as the page allows no style ones.
 */
export function ToleranceBar({ value, unit, band, aim, label, words, decimals = 3, className }: ToleranceBarProps) {
  const place = placer(value, band, aim);
  const at = place(value);
  const isWithin = isWithinBand(value, band);
  const said = words ?? readingWords(value, unit, band, decimals);
  const [low, high] = [band.low === undefined ? 0 : place(band.low).percent, bandEnd(band, place)];
  return (
    <div className={clsx('flex flex-wrap items-center gap-x-4 gap-y-1', className)}>
      <svg aria-hidden="true" focusable="false" className="block h-6 w-28 flex-none sm:w-40 overflow-visible">
        <rect y="10" width="100%" height="4" className="fill-line" />
        <rect x={`${low}%`} y="6" width={`${round(high - low)}%`} height="12" className="fill-finish-wash" />
        {aim !== undefined && (
          <rect x={`${place(aim).percent}%`} y="6" width="1" height="12" className="fill-finish-deep" />
        )}
        <svg x={`${at.percent}%`} className="overflow-visible">
          <rect x="-1.5" width="3" height="24" className={isWithin ? 'fill-ink' : 'fill-late'} />
          {at.isOff && <path d={at.percent > 50 ? 'M5 7l6 5-6 5z' : 'M-5 7l-6 5 6 5z'} className="fill-late" />}
        </svg>
      </svg>
      <p className={clsx('narrow', !isWithin && 'text-late')}>
        {label && <span className="sr-only">{label}: </span>}
        {said}
      </p>
    </div>
  );
}

export function isWithinBand(value: number, { low = -Infinity, high = Infinity }: ToleranceBarProps['band']): boolean {
  return value >= low && value <= high;
}

/** "0.011 in, within 0 to 0.012 in", "9.4 %, over 8 %" */
export function readingWords(value: number, unit: string, band: ToleranceBarProps['band'], decimals: number): string {
  const behind = unit === '' ? '' : ` ${unit}`;
  const show = (shown: number) => figure(shown, decimals);
  const shown = `${show(value)}${behind}`;
  const { low, high } = band;
  if (low !== undefined && value < low) return `${shown}, under ${show(low)}${behind}`;
  if (high !== undefined && value > high) return `${shown}, over ${show(high)}${behind}`;
  if (low !== undefined && high !== undefined) return `${shown}, within ${show(low)} to ${show(high)}${behind}`;
  if (high !== undefined) return `${shown}, limit ${show(high)}${behind}`;
  return low === undefined ? shown : `${shown}, at least ${show(low)}${behind}`;
}

/** Where a figure stands along the bar, from its left end. An open side of the band begins or ends with the bar. */
function placer(value: number, band: ToleranceBarProps['band'], aim?: number) {
  const low = band.low ?? Math.min(aim ?? 0, 0, band.high ?? value);
  const high = band.high ?? Math.max(aim ?? value, low + 1, value);
  const widthOfBand = high - low || Math.abs(low) * 0.1 || 1;
  const whole = widthOfBand / BAND_SHARE;
  const start = band.low === undefined ? low : low - (whole - widthOfBand) / 2;
  return (shown: number) => {
    const share = Number.isFinite(shown) ? (shown - start) / whole : 0;
    return { percent: round(Math.min(1, Math.max(0, share)) * 100), isOff: share < 0 || share > 1 };
  };
}

function bandEnd(band: ToleranceBarProps['band'], place: ReturnType<typeof placer>): number {
  return band.high === undefined ? 100 : place(band.high).percent;
}

const round = (percent: number) => Number(percent.toFixed(2));
