import { memo } from 'react';
import { FingerboardDrawing } from '../fingerboard-drawing';
import { FretTable } from '../fret-table';
import { SpecStrings } from '../spec-strings';
import { SectionHeading } from '@/components/ui/section-heading';
import { fingerboard } from '@/lib/craft/fingerboard';
import { fretTable } from '@/lib/craft/fret-table';
import { boardOf, scalePlanOf, stringPlanOf } from '@/lib/specs/board';
import type { SpecDocument } from '@/lib/specs/document';

type ComputedProps = {
  document: SpecDocument;
  /** What all of it is computed from, in one text: while that stays, nothing is drawn anew. */
  from: string;
};

const isSameSource = (before: ComputedProps, after: ComputedProps) => before.from === after.from;

/** The board of what is being typed. */
export const ComputedBoard = memo(Board, isSameSource);

/** The strings and the fret table of what is being typed. */
export const ComputedFigures = memo(function ComputedFigures({ document }: ComputedProps) {
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-8">
      <section aria-label="String tension" className="contain-content">
        <SectionHeading className="mb-4">Balance across the strings</SectionHeading>
        <SpecStrings document={document} />
      </section>
      <section aria-label="Fret table" className="contain-content">
        <SectionHeading className="mb-4">Fret table</SectionHeading>
        <Frets document={document} />
      </section>
    </div>
  );
}, isSameSource);

function Board({ document }: ComputedProps) {
  const plan = boardOf(document);
  const drawn = plan.ok ? fingerboard(plan.value) : plan;
  if (!drawn.ok) return <p className="text-soft">{drawn.message}</p>;
  const strings = stringPlanOf(document);
  const gaugesThou = strings.ok ? strings.value.strings.map(({ gauge }) => gauge.gaugeThou) : undefined;
  return <FingerboardDrawing board={drawn.board} unit="in" gaugesThou={gaugesThou} />;
}

function Frets({ document }: { document: SpecDocument }) {
  const plan = scalePlanOf(document);
  const table = plan.ok ? fretTable(plan.value) : plan;
  return table.ok ? <FretTable table={table.table} /> : <p className="text-soft">{table.message}</p>;
}
