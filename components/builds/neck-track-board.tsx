import { clsx } from 'clsx';
import { neckSpacing } from '@/lib/craft/frets';
import { markerCount, type NeckStage } from './neck-track-stage';

type BoardProps = {
  stages: NeckStage[];
  /** Share of the stage of now that is done, 0 to 1. */
  nowShare: number;
  hasMarkers?: boolean;
  /** The stage of now has just moved: its fret fills once. */
  hasMoved?: boolean;
  className?: string;
};

const percent = (share: number) => `${Number((share * 100).toFixed(3))}%`;

/** The neck itself, drawn to fill its box: nut, wood, finish, frets, markers. Silent to a screen reader; a list or label says it. */
export function NeckBoard({ stages, nowShare, hasMarkers = true, hasMoved = false, className }: BoardProps) {
  const boundaries = neckSpacing(stages.length);
  const frets = stages.map((stage, index) => {
    const from = boundaries[index] ?? 0;
    return { stage, number: index + 1, from, width: (boundaries[index + 1] ?? 1) - from };
  });
  return (
    <div aria-hidden="true" className={clsx('flex', className)}>
      <div className="w-1.5 rounded-l-[3px] bg-nut" />
      <div className="wood neck-light flex-1 overflow-hidden rounded-r-[5px] outline-1 -outline-offset-1 outline-black/20 dark:outline-white/25">
        <svg width="100%" height="100%" focusable="false" className="block">
          {frets.map((fret) => (
            <FretFill key={fret.number} {...fret} nowShare={nowShare} hasMoved={hasMoved} />
          ))}
          {frets.map(({ number, from, width }) => (
            <line
              key={number}
              x1={percent(from + width)}
              x2={percent(from + width)}
              y1="0"
              y2="100%"
              strokeWidth="2.5"
              className="stroke-fret"
            />
          ))}
          {hasMarkers &&
            frets.map((fret) => (
              <Markers
                key={fret.number}
                {...fret}
                count={markerCount(fret.number, stages.length)}
                nowShare={nowShare}
              />
            ))}
        </svg>
      </div>
    </div>
  );
}

type FretProps = { stage: NeckStage; from: number; width: number; nowShare: number };

/** Finish as far as the stage is done; the rest of the stage of now shows through, with an edge that holds for a black finish too. */
function FretFill({ stage, from, width, nowShare, hasMoved }: FretProps & { hasMoved: boolean }) {
  if (stage.state === 'ahead') return null;
  if (stage.state === 'done')
    return <rect x={percent(from)} width={percent(width)} height="100%" className="fill-finish" />;
  const share = Math.min(1, Math.max(0, nowShare));
  const edge = percent(from + width * share);
  return (
    <>
      <rect x={percent(from)} width={percent(width)} height="100%" className="fill-finish opacity-30" />
      <rect
        x={percent(from)}
        width={percent(width * share)}
        height="100%"
        className={clsx('fill-finish', hasMoved && 'neck-fill')}
      />
      <line x1={edge} x2={edge} y1="0" y2="100%" strokeWidth="1.5" className="stroke-nut" />
    </>
  );
}

function Markers({ stage, from, width, nowShare, count }: FretProps & { count: 0 | 1 | 2 }) {
  const isOnFinish = stage.state === 'done' || (stage.state === 'now' && nowShare > 0.6);
  const heights = [[], ['50%'], ['32%', '68%']][count] ?? [];
  return heights.map((height) => (
    <circle
      key={height}
      cx={percent(from + width / 2)}
      cy={height}
      r="5.5"
      className={isOnFinish ? 'fill-on-finish opacity-90' : 'fill-nut opacity-50'}
    />
  ));
}
