import { clsx } from 'clsx';
import { neckSpacing } from '@/lib/craft/frets';
import { finishKey } from './finish-style';
import { NeckBoard } from './neck-track-board';
import { neckSummary, type NeckStage } from './neck-track-stage';

type StripProps = {
  stages: NeckStage[];
  nowShare: number;
  /** The build's own finish, `#rrggbb`; `FinishStyles` must know it. The page's finish when left out. */
  finishHex?: string;
  className?: string;
};

/** One build's neck in a list of builds. */
export function NeckStrip({ stages, nowShare, finishHex, className }: StripProps) {
  if (stages.length === 0) return null;
  return (
    <div
      role="img"
      aria-label={neckSummary(stages)}
      data-finish={finishHex && finishKey(finishHex)}
      className={clsx('min-w-40', className)}
    >
      <NeckBoard stages={stages} nowShare={nowShare} hasMarkers={false} className="h-6" />
    </div>
  );
}

/** Stage names at a slant over the necks of many builds on one route; as wide as the strips below it. */
export function NeckNames({ names, className }: { names: string[]; className?: string }) {
  if (names.length === 0) return null;
  const boundaries = neckSpacing(names.length);
  return (
    <div className={clsx('min-w-88 pl-1.5', className)}>
      <svg
        role="img"
        aria-label={`Stages: ${names.join(', ')}`}
        width="100%"
        height="92"
        className="block overflow-visible text-xs"
      >
        {names.map((name, index) => {
          const middle = ((boundaries[index] ?? 0) + (boundaries[index + 1] ?? 1)) / 2;
          return (
            <svg key={name} x={`${Number((middle * 100).toFixed(3))}%`} y="86" className="overflow-visible">
              <text transform="rotate(-48)" className="fill-soft">
                {name}
              </text>
            </svg>
          );
        })}
      </svg>
    </div>
  );
}
