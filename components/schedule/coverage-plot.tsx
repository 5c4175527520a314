import { useId } from 'react';

type Coverage = { held: number; of: number; share: number; low: number; high: number };
type CoveragePlotProps = { title: string; rows: readonly { key: string; name: string; coverage: Coverage }[] };

const ROW_PX = 30;
const AIM = 0.8;
const percent = (share: number) => `${Math.round(share * 1000) / 10}%`;

/** How often windows held, each with the bounds of what the true share may be (95 %), beside the aim of 8 in 10. */
export function CoveragePlot({ title, rows }: CoveragePlotProps) {
  const id = useId();
  const words = rows.map(({ name, coverage }) => `${name} ${coverage.held} of ${coverage.of}`).join(', ');
  return (
    <div className="grid grid-cols-[minmax(7rem,auto)_minmax(0,1fr)_auto] gap-x-3 text-sm">
      <ul role="list" aria-hidden="true">
        {rows.map(({ key, name }) => (
          <li key={key} className="flex h-[30px] items-center">
            {name}
          </li>
        ))}
      </ul>
      <svg role="img" aria-labelledby={id} width="100%" height={rows.length * ROW_PX + 22} className="overflow-visible">
        <title id={id}>{`${title}: windows that held. ${words}.`}</title>
        <line
          x1={percent(AIM)}
          x2={percent(AIM)}
          y1="0"
          y2={rows.length * ROW_PX}
          strokeDasharray="6 4"
          className="stroke-ink"
        />
        <text x={percent(AIM)} y={rows.length * ROW_PX + 16} textAnchor="middle" className="narrow fill-soft">
          8 in 10
        </text>
        {rows.map(({ key, coverage: { low, high, share } }, index) => {
          const y = index * ROW_PX + ROW_PX / 2;
          return (
            <g key={key}>
              <line x1="0" x2="100%" y1={y} y2={y} className="stroke-line" />
              <line x1={percent(low)} x2={percent(high)} y1={y} y2={y} strokeWidth="8" className="stroke-finish-wash" />
              <circle cx={percent(share)} cy={y} r="5" className="fill-finish-deep" />
            </g>
          );
        })}
      </svg>
      <ul role="list" aria-hidden="true" className="narrow text-right text-soft">
        {rows.map(({ key, coverage: { held, of } }) => (
          <li key={key} className="flex h-[30px] items-center justify-end">
            {held} of {of}
          </li>
        ))}
      </ul>
    </div>
  );
}
