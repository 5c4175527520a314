import { clsx } from 'clsx';
import { markerCount, stageDate, type NeckDateLabels, type NeckStage } from './neck-track-stage';

type UprightProps = { stages: NeckStage[]; nowShare: number; dateLabels: NeckDateLabels };

/** The neck standing beside the names of its stages, for a narrow screen. */
export function NeckUpright({ stages, nowShare, dateLabels }: UprightProps) {
  return (
    <div>
      <div aria-hidden="true" className="h-1.5 w-12 rounded-t-[3px] bg-nut" />
      <ol role="list" className={clsx('frets flex-col', uprightHeight(stages.length))}>
        {stages.map((stage, index) => (
          <li
            key={stage.name}
            aria-current={stage.state === 'now' ? 'step' : undefined}
            className="flex items-stretch gap-4"
          >
            <UprightFret
              stage={stage}
              nowShare={nowShare}
              markers={markerCount(index + 1, stages.length)}
              isLast={index === stages.length - 1}
            />
            <StageLine stage={stage} date={stageDate(stage, index === stages.length - 1, dateLabels)} />
          </li>
        ))}
      </ol>
    </div>
  );
}

/** Tall enough for the shortest, last fret to hold a line of text. */
function uprightHeight(stageCount: number): string {
  if (stageCount <= 6) return 'h-68';
  if (stageCount <= 9) return 'h-100';
  if (stageCount <= 12) return 'h-136';
  return stageCount <= 15 ? 'h-180' : 'h-300';
}

function StageLine({ stage, date }: { stage: NeckStage; date: string }) {
  const isNow = stage.state === 'now';
  return (
    <div className="flex flex-1 items-center justify-between gap-3">
      <span className={clsx(isNow && 'font-semibold text-finish-deep', stage.state === 'ahead' && 'text-soft')}>
        {stage.name}
        <span className="sr-only">, {stage.state === 'done' ? 'finished' : stage.state}</span>
      </span>
      <span className="text-sm text-soft tabular-nums">{date}</span>
    </div>
  );
}

type FretProps = { stage: NeckStage; nowShare: number; markers: 0 | 1 | 2; isLast: boolean };

function UprightFret({ stage, nowShare, markers, isLast }: FretProps) {
  const isOnFinish = stage.state === 'done' || (stage.state === 'now' && nowShare > 0.6);
  return (
    <div
      aria-hidden="true"
      className={clsx(
        'relative w-12 shrink-0 overflow-hidden border-b-[3px] border-fret',
        stage.state === 'done' ? 'bg-finish' : 'wood',
        isLast && 'rounded-b-[4px]',
      )}
    >
      {stage.state === 'now' && <NowFill share={nowShare} />}
      <div className="absolute inset-0 flex items-center justify-center gap-2">
        {Array.from({ length: markers }, (_, marker) => (
          <span
            key={marker}
            className={clsx('size-2.5 rounded-full', isOnFinish ? 'bg-on-finish opacity-90' : 'bg-nut opacity-50')}
          />
        ))}
      </div>
    </div>
  );
}

function NowFill({ share }: { share: number }) {
  const edge = `${Math.round(Math.min(1, Math.max(0, share)) * 100)}%`;
  return (
    <svg width="100%" height="100%" focusable="false" className="absolute inset-0">
      <rect width="100%" height="100%" className="fill-finish opacity-30" />
      <rect width="100%" height={edge} className="fill-finish" />
      <line x1="0" x2="100%" y1={edge} y2={edge} strokeWidth="1.5" className="stroke-nut" />
    </svg>
  );
}
