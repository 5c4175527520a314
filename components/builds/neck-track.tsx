import { clsx } from 'clsx';
import { NeckBoard } from './neck-track-board';
import { labelShiftPx, layoutLabels, NECK_WIDTHS_PX, type NeckLabel } from './neck-track-labels';
import { neckSummary, nowNote, stageState, type NeckDateLabels, type NeckStage } from './neck-track-stage';
import { NeckUpright } from './neck-track-upright';

type NeckTrackProps = {
  stages: NeckStage[];
  /** Share of the stage of now that is done, 0 to 1. */
  nowShare: number;
  /** The slim strip at any width. */
  compact?: boolean;
  dateLabels?: NeckDateLabels;
  /** The stage of now has just moved: its fret fills once. */
  hasMoved?: boolean;
};

/**
 * A build's progress as a neck: one fret a stage, spaced as real frets are. Every fret names its stage on focus, hover and tap, and the
 * whole is an ordered list to a screen reader. Where there is less than 44rem of room it is a slim strip that opens upright. Draws nothing
 * for a build without stages.
 */
export function NeckTrack({ stages, nowShare, compact = false, dateLabels = {}, hasMoved = false }: NeckTrackProps) {
  if (stages.length === 0) return null;
  return (
    <div className="@container">
      {!compact && (
        <div className="hidden @min-[44rem]:block">
          <div className="relative">
            <NeckBoard stages={stages} nowShare={nowShare} hasMoved={hasMoved} className="h-12" />
            <FretNames stages={stages} dateLabels={dateLabels} />
          </div>
          <Labels labels={layoutLabels(stages, dateLabels, NECK_WIDTHS_PX.narrow)} className="@min-[72rem]:hidden" />
          <Labels
            labels={layoutLabels(stages, dateLabels, NECK_WIDTHS_PX.wide)}
            className="hidden @min-[72rem]:block"
          />
        </div>
      )}
      <details className={clsx('group/neck', !compact && '@min-[44rem]:hidden')}>
        <summary className="block list-none">
          <NeckBoard stages={stages} nowShare={nowShare} hasMarkers={false} hasMoved={hasMoved} className="h-4" />
          <SlimLine stages={stages} dateLabels={dateLabels} />
        </summary>
        <div className="pt-3 pb-1">
          <NeckUpright stages={stages} nowShare={nowShare} dateLabels={dateLabels} />
        </div>
      </details>
    </div>
  );
}

type NamesProps = { stages: NeckStage[]; dateLabels: NeckDateLabels };

/** The list that lies over the drawing: each fret can be pointed at, tapped or reached by key, and then shows its name. */
function FretNames({ stages, dateLabels }: NamesProps) {
  return (
    <ol role="list" aria-label="Stages of this build" className="frets absolute inset-y-0 right-0 left-1.5">
      {stages.map((stage, index) => (
        <li key={stage.name} aria-current={stage.state === 'now' ? 'step' : undefined} className="relative">
          <span tabIndex={0} className="group/fret absolute inset-0 rounded-sm">
            <span className={clsx(fretNameClass, fretNameSide(index, stages.length))}>
              <span className="font-semibold">{stage.name}</span>,{' '}
              {stageState(stage, index === stages.length - 1, dateLabels)}
            </span>
          </span>
        </li>
      ))}
    </ol>
  );
}

const fretNameClass =
  'pointer-events-none absolute bottom-full z-10 mb-1.5 rounded bg-ink px-2.5 py-1 text-sm whitespace-nowrap text-film opacity-0 ' +
  'group-hover/fret:pointer-events-auto group-hover/fret:opacity-100 group-focus/fret:opacity-100';

function fretNameSide(index: number, stageCount: number): string {
  const share = index / stageCount;
  if (share < 0.25) return 'left-0';
  return share > 0.65 ? 'right-0' : 'left-1/2 -translate-x-1/2';
}

function Labels({ labels, className }: { labels: NeckLabel[]; className: string }) {
  return (
    <div aria-hidden="true" className={clsx('pl-1.5', className)}>
      <svg width="100%" height="46" focusable="false" className="block overflow-visible text-[0.8125rem]">
        {labels.map((label) => {
          const x = `${Number((label.at * 100).toFixed(3))}%`;
          const isNow = label.role === 'now';
          const text = { x, dx: labelShiftPx(label), textAnchor: label.anchor };
          return (
            <g key={label.role}>
              {isNow && <line x1={x} x2={x} y1="6" y2="42" strokeWidth="2.5" className="stroke-finish-deep" />}
              <text {...text} y="20" className={clsx('font-semibold', isNow ? 'fill-finish-deep' : 'fill-ink')}>
                {label.name}
              </text>
              <text {...text} y="38" className="fill-soft tabular-nums">
                {label.note}
              </text>
            </g>
          );
        })}
      </svg>
    </div>
  );
}

function SlimLine({ stages, dateLabels }: NamesProps) {
  const now = stages.find((stage) => stage.state === 'now');
  const position = stages.findIndex((stage) => stage === now) + 1;
  return (
    <span className="flex min-h-11 items-center justify-between gap-3">
      {now ? (
        <span>
          <span className="font-semibold text-finish-deep">{now.name}</span>{' '}
          <span className="text-sm text-soft">{nowNote(now, dateLabels)}</span>
        </span>
      ) : (
        <span className="font-semibold">{neckSummary(stages)}</span>
      )}
      <span className="flex shrink-0 items-center gap-2 text-sm text-soft tabular-nums">
        {now ? `${position} of ${stages.length}` : 'All stages'}
        <svg width="12" height="8" aria-hidden="true" focusable="false" className="group-open/neck:rotate-180">
          <path d="M1 1.5l5 5 5-5" fill="none" strokeWidth="1.8" className="stroke-soft" />
        </svg>
      </span>
    </span>
  );
}
