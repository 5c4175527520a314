'use client';

import { useEffect, useEffectEvent, useId, type ReactNode } from 'react';
import { BoothFields } from './booth-fields';
import { CoatFields } from './coat-fields';
import { ColourFields } from './colour-fields';
import type { FieldsProps } from './fields';
import { MeasureFields } from './measure-fields';
import { PapersField } from './papers-field';
import { SetUpAids } from './set-up-aids';
import { WoodRoomFields } from './wood-room-fields';
import type { KeptReadings } from '@/lib/drafts';
import { hasReadings, planReadings, type BenchBuild, type BenchStage } from '@/lib/readings/plan';
import { readTyped, standOf, type ReadingStand } from '@/lib/readings/read-typed';
import { isBlankTyped, type TypedReadings } from '@/lib/readings/typed';

type ReadingsPanelProps = {
  stage: BenchStage & { id: string; name: string };
  bench: BenchBuild;
  readings: KeptReadings;
  isMissingSaid: boolean;
  isLocked: boolean;
  onType: (typed: TypedReadings, stand: ReadingStand) => void;
};

/** The fields of a stage's readings. They are read again with every key, by the rules the shop's side judges them by. */
export function ReadingsPanel({ stage, bench, readings, isMissingSaid, isLocked, onType }: ReadingsPanelProps) {
  const plan = planReadings(stage, bench);
  const { typed, stand } = readings;
  const tell = (next: TypedReadings) => onType(next, standOf(stage.id, readTyped(next, plan)));
  useReadAgain(stand === null && !isBlankTyped(typed), () => tell(typed));
  if (!hasReadings(plan)) return <p className="text-soft">Nothing is measured at {stage.name}.</p>;
  const props: FieldsProps = {
    typed,
    plan,
    read: readTyped(typed, plan),
    isMissingSaid,
    onType: (change) => tell({ ...typed, ...change }),
  };
  return (
    <fieldset disabled={isLocked} className="grid gap-6 disabled:opacity-60">
      <legend className="sr-only">Readings at {stage.name}</legend>
      {plan.hasWoodRoom && (
        <Part title="Wood room">
          <WoodRoomFields {...props} />
        </Part>
      )}
      {plan.hasBooth && (
        <Part title="Air of the booth">
          <BoothFields {...props} />
        </Part>
      )}
      {plan.hasCoat && (
        <Part title="Coat">
          <CoatFields {...props} />
        </Part>
      )}
      {plan.colours && (
        <Part title="Colour">
          <ColourFields {...props} colours={plan.colours} />
        </Part>
      )}
      {plan.hasPapers && (
        <Part title="Papers">
          <PapersField {...props} />
        </Part>
      )}
      {plan.lines.length > 0 && (
        <Part title={plan.work === 'setup' ? 'Set-up sheet' : 'Measures of the spec'}>
          {plan.work === 'setup' && <SetUpAids {...props} />}
          <MeasureFields {...props} />
        </Part>
      )}
    </fieldset>
  );
}

/** After a change of stage what was typed is read for the new one. */
function useReadAgain(isDue: boolean, read: () => void): void {
  const readNow = useEffectEvent(read);
  useEffect(() => {
    if (isDue) readNow();
  }, [isDue]);
}

function Part({ title, children }: { title: string; children: ReactNode }) {
  const id = useId();
  return (
    <section aria-labelledby={id} className="grid gap-3">
      <h3 id={id} className="text-lg">
        {title}
      </h3>
      {children}
    </section>
  );
}
