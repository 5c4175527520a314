import { gaugeWords } from '@/lib/craft/gauges';
import { noteWords } from '@/lib/craft/notes';
import { balanceWords, type BalancedString, type StringBalance as Balance } from '@/lib/craft/string-balance';

/** Bars end at no less than this, so that a light set does not look as tight as a heavy one. */
const LEAST_FULL_LB = 25;

/** Tension string by string beside the band the player chose, treble side first, and the same in words. */
export function StringBalance({ balance, className }: { balance: Balance; className?: string }) {
  const most = Math.max(balance.band?.highLb ?? 0, ...balance.strings.map(({ tensionLb }) => tensionLb));
  const fullLb = Math.max(LEAST_FULL_LB, most * 1.06);
  return (
    <div className={className}>
      <table className="w-full border-collapse text-left">
        <caption className="sr-only">Tension of each string</caption>
        <thead className="sr-only">
          <tr>
            <th scope="col">String</th>
            <th scope="col">Gauge</th>
            <th scope="col">Beside the band</th>
            <th scope="col">Tension</th>
          </tr>
        </thead>
        <tbody>
          {balance.strings.map((string) => (
            <StringRow key={string.number} string={string} band={balance.band} fullLb={fullLb} />
          ))}
        </tbody>
      </table>
      <p className="pt-3 text-sm text-soft">{balanceWords(balance)}</p>
    </div>
  );
}

type RowProps = { string: BalancedString; band: Balance['band']; fullLb: number };

function StringRow({ string, band, fullLb }: RowProps) {
  const { note, gauge, tensionLb, tensionN, standing } = string;
  const isOut = standing === 'below' || standing === 'above';
  return (
    <tr>
      <th scope="row" className="py-1.5 pr-3 font-semibold">
        {noteWords(note)}
      </th>
      <td className="pr-4 text-soft">
        {gaugeWords(gauge.gaugeThou)}
        <span className="sr-only"> {gauge.construction}</span>
      </td>
      <td className="w-full">
        <Bar tensionLb={tensionLb} band={band} fullLb={fullLb} />
        {band && <span className="sr-only">{isOut ? `${standing} the band` : 'within the band'}</span>}
      </td>
      <td className="pl-4 text-right whitespace-nowrap">
        {tensionLb.toFixed(1)} lb
        <span className="block text-xs text-soft">
          {Math.round(tensionN)} N{isOut && <span className="text-late"> · {standing}</span>}
        </span>
      </td>
    </tr>
  );
}

function Bar({ tensionLb, band, fullLb }: { tensionLb: number; band: Balance['band']; fullLb: number }) {
  const across = (lb: number) => `${Number(((Math.min(lb, fullLb) / fullLb) * 100).toFixed(2))}%`;
  return (
    <svg aria-hidden="true" width="100%" height="12" className="block">
      <rect width="100%" height="12" rx="6" className="fill-line" />
      {band && (
        <rect
          x={across(band.lowLb)}
          width={across(band.highLb - band.lowLb)}
          height="12"
          className="fill-finish-wash"
        />
      )}
      <rect y="3" width={across(tensionLb)} height="6" rx="3" className="fill-finish-deep" />
    </svg>
  );
}
