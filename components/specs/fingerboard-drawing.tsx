import { useId } from 'react';
import { clsx } from 'clsx';
import type { Fingerboard } from '@/lib/craft/fingerboard';
import { drawingCaption, fingerboardWords, type FretUnit } from '@/lib/craft/fret-words';
import { drawingFrame, slotLabels } from '@/lib/craft/slot-labels';
import { BoardFace } from './board-face';

type DrawingProps = {
  board: Fingerboard;
  unit: FretUnit;
  /** Thickness of each string, treble side first; a usual set is drawn without it. */
  gaugesThou?: readonly number[];
  className?: string;
};

/** Least width of the drawing, in px, at which each set of labels has room, and where it is shown. */
const labelSets = [
  { widthPx: 300, className: 'sm:hidden' },
  { widthPx: 560, className: 'hidden sm:block lg:hidden' },
  { widthPx: 900, className: 'hidden lg:block' },
] as const;

/** A fingerboard to true scale with its slot positions below, and above too where it has two scales. */
export function FingerboardDrawing({ board, unit, gaugesThou, className }: DrawingProps) {
  const id = useId();
  const { left, top, width, height } = drawingFrame(board);
  return (
    <figure className={className}>
      <figcaption className="pb-3 text-sm text-soft">{drawingCaption(board, unit)}</figcaption>
      {board.table.isMultiscale && <SlotLabels board={board} unit={unit} side="treble" />}
      <svg
        role="img"
        aria-labelledby={`${id}-title`}
        aria-describedby={`${id}-words`}
        viewBox={[left, top, width, height].join(' ')}
        className="block h-auto w-full"
      >
        <title id={`${id}-title`}>Fingerboard, drawn to scale</title>
        <desc id={`${id}-words`}>{fingerboardWords(board, unit)}</desc>
        <BoardFace board={board} gaugesThou={gaugesThou} />
      </svg>
      <SlotLabels board={board} unit={unit} side="bass" />
    </figure>
  );
}

/** Type that keeps its size while the drawing shrinks: each width has its own labels. The table says the same to a screen reader. */
function SlotLabels({ board, unit, side }: Pick<DrawingProps, 'board' | 'unit'> & { side: 'bass' | 'treble' }) {
  return labelSets.map((set) => (
    <svg key={set.widthPx} aria-hidden="true" width="100%" height="24" className={clsx('block', set.className)}>
      {slotLabels(board, side, unit, set.widthPx).map(({ fret, words, across }) => (
        <text
          key={fret}
          x={`${Number((across * 100).toFixed(3))}%`}
          y="17"
          textAnchor="middle"
          className="narrow fill-soft text-[0.78125rem]"
        >
          {words}
        </text>
      ))}
    </svg>
  ));
}
