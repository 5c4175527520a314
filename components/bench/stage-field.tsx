import { useId, type Dispatch } from 'react';
import type { DraftEvent } from './draft-state';
import type { StageChoice } from './stage-choice';
import { Checkbox } from '@/components/ui/checkbox';
import { fieldAria, FieldError } from '@/components/ui/field';

type StageFieldProps = {
  stages: StageChoice[];
  stageId: string;
  startStage: boolean;
  error?: string;
  isLocked: boolean;
  dispatch: Dispatch<DraftEvent>;
};

const words = { done: ' (finished)', now: ' (now)', ahead: '' };

/** Which stage the entry belongs to, and whether a stage ahead begins with it. */
export function StageField({ stages, stageId, startStage, error, isLocked, dispatch }: StageFieldProps) {
  const id = useId();
  const index = stages.findIndex((stage) => stage.id === stageId);
  const isAhead = stages[index]?.state === 'ahead';
  return (
    <div className="border-b border-line pb-1">
      <div className="flex items-center gap-4">
        <label htmlFor={id} className="text-lg">
          Stage
        </label>
        <select
          {...fieldAria(id, { error })}
          value={stageId}
          disabled={isLocked}
          onChange={({ target }) => dispatch({ type: 'stage-chosen', stageId: target.value })}
          className="min-h-13 min-w-0 flex-1 rounded-[5px] bg-transparent pr-1 text-lg font-semibold text-ellipsis [text-align-last:right] disabled:opacity-60 [&>option]:bg-sheet [&>option]:text-ink"
        >
          {stages.map(({ id: value, name, state }) => (
            <option key={value} value={value}>
              {name}
              {words[state]}
            </option>
          ))}
        </select>
      </div>
      <FieldError id={id} error={error} />
      {isAhead && (
        <Checkbox
          label="Start this stage now"
          hint={index > 0 ? 'The stages before it end with this entry.' : undefined}
          checked={startStage}
          disabled={isLocked}
          onChange={({ target }) => dispatch({ type: 'start-chosen', startStage: target.checked })}
        />
      )}
    </div>
  );
}
