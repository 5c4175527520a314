'use client';

import { useActionState } from 'react';
import { FormOutcome, refusalIn } from '@/components/people/form-outcome';
import { HiddenFields } from '@/components/people/hidden-fields';
import { Button } from '@/components/ui/button';
import { Select, type Option } from '@/components/ui/select';
import { TextArea } from '@/components/ui/text-input';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';

type FinishFormProps = {
  finish: FormAction;
  values: Record<string, string>;
  stages: Option[];
  hasFailed: boolean;
  leftCount: number;
  lineCount: number;
};

/** Ends a walk through a list. A fail asks where the build goes back to, and why. */
export function FinishForm({ finish, values, stages, hasFailed, leftCount, lineCount }: FinishFormProps) {
  const [state, send, isSending] = useActionState(finish, fresh);
  const refused = refusalIn(state);
  return (
    <form action={send} className="grid gap-4 py-6">
      <HiddenFields values={values} />
      {hasFailed && (
        <>
          <Select
            label="It goes back to"
            name="backToStageId"
            prompt="Choose a stage"
            controlSize="bench"
            options={stages}
            defaultValue={refused?.values.backToStageId}
            error={refused?.fields.backToStageId}
          />
          <TextArea
            label="Why"
            name="reason"
            rows={3}
            maxLength={300}
            controlSize="bench"
            hint="The next hands read this. What the player is told is the rep’s to decide."
            defaultValue={refused?.values.reason}
            error={refused?.fields.reason}
          />
        </>
      )}
      <p role="status" className="text-soft">
        {leftCount === 0 ? 'Every line is saved.' : `${leftCount} of ${lineCount} lines to go.`}
      </p>
      <FormOutcome state={state} shown={['backToStageId', 'reason']} />
      <Button type="submit" size="bench" isWide variant={hasFailed ? 'danger' : 'primary'} disabled={isSending}>
        {hasFailed ? 'It fails: send it back' : 'It passes'}
      </Button>
    </form>
  );
}
