'use client';

import dynamic from 'next/dynamic';
import { useId, useState, type Dispatch } from 'react';
import type { DraftEvent } from './draft-state';
import { FoldRow } from './fold-row';
import type { StageChoice } from './stage-choice';
import { FieldError } from '@/components/ui/field';
import type { KeptReadings } from '@/lib/drafts';
import type { BenchBuild } from '@/lib/readings/plan';
import { isBlankTyped } from '@/lib/readings/typed';

/** What computes the readings is fetched when somebody takes some. */
const ReadingsPanel = dynamic(
  () =>
    import('@/components/readings/readings-panel').then(
      ({ ReadingsPanel: panel }) => panel,
      () => NotFetched,
    ),
  { ssr: false, loading: () => <p role="status">The fields are being fetched.</p> },
);

function NotFetched() {
  return (
    <p role="alert">The fields could not be fetched. Reload the page when there is signal; what you wrote stays.</p>
  );
}

type ReadingsFieldProps = {
  stage: StageChoice;
  bench: BenchBuild;
  readings: KeptReadings;
  error?: string;
  isLocked: boolean;
  dispatch: Dispatch<DraftEvent>;
};

/** The readings of the chosen stage, folded until the first is taken. */
export function ReadingsField({ stage, bench, readings, error, isLocked, dispatch }: ReadingsFieldProps) {
  const id = useId();
  const isTyped = !isBlankTyped(readings.typed);
  const [isWanted, setIsWanted] = useState(isTyped);
  return (
    <FoldRow
      label="Readings"
      said={standWords(readings)}
      isOpenAtFirst={isTyped}
      isCalled={error !== undefined}
      onOpen={() => setIsWanted(true)}
    >
      <div role="alert" tabIndex={-1} className="outline-none empty:hidden">
        <FieldError id={id} error={error} />
      </div>
      {isWanted && (
        <ReadingsPanel
          stage={stage}
          bench={bench}
          readings={readings}
          isMissingSaid={error !== undefined}
          isLocked={isLocked}
          onType={(typed, stand) => dispatch({ type: 'reading-typed', typed, stand })}
        />
      )}
    </FoldRow>
  );
}

function standWords({ stand }: KeptReadings): string {
  if (!stand) return 'none yet';
  if (stand.isRefused) return 'not complete';
  const count = stand.readings.length;
  if (count === 0) return 'none yet';
  return stand.outsideCount === 0 ? `${count} taken` : `${count} taken, ${stand.outsideCount} out of tolerance`;
}
