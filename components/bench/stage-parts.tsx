'use client';

import type { Dispatch } from 'react';
import type { Draft, DraftEvent } from './draft-state';
import type { Problem } from './posting-state';
import { provenAt } from './proof-choice';
import { ReadingsField } from './readings-field';
import { ShowsField } from './shows-field';
import type { StageChoice } from './stage-choice';
import { Cautions } from '@/components/craft/cautions';
import { cautionsForWork } from '@/lib/craft/cautions';
import type { BenchBuild } from '@/lib/readings/plan';

type StagePartsProps = {
  draft: Draft;
  stages: StageChoice[];
  stageId: string;
  bench: BenchBuild;
  fields: Problem['fields'];
  isLocked: boolean;
  dispatch: Dispatch<DraftEvent>;
};

/** What belongs to the chosen stage: its readings, what of the spec it shows, and what to mind at this work. */
export function StageParts({ draft, stages, stageId, bench, fields, isLocked, dispatch }: StagePartsProps) {
  const stage = stages.find(({ id }) => id === stageId);
  if (!stage) return null;
  const { stand } = draft.readings;
  const taken = stand?.stageId === stageId ? stand.readings : [];
  return (
    <>
      <ReadingsField
        stage={stage}
        bench={bench}
        readings={draft.readings}
        error={fields.readings}
        isLocked={isLocked}
        dispatch={dispatch}
      />
      <ShowsField
        items={provenAt(bench.items, stages, stageId)}
        proves={draft.proves}
        measured={new Set(taken.flatMap(({ itemKey }) => itemKey ?? []))}
        error={fields.proves}
        isLocked={isLocked}
        dispatch={dispatch}
      />
      <Cautions cautions={cautionsForWork(stage.work)} />
    </>
  );
}
