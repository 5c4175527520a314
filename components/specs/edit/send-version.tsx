'use client';

import { useActionState } from 'react';
import { FormOutcome, refusalIn } from '@/components/people/form-outcome';
import { HiddenFields } from '@/components/people/hidden-fields';
import { Button } from '@/components/ui/button';
import { Select, type Option } from '@/components/ui/select';
import { TextArea, TextInput } from '@/components/ui/text-input';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';

type SendVersionProps = {
  send: FormAction;
  orderNumber: string;
  revision: number;
  nextNumber: number;
  /** Stages that have not begun. */
  stagesAhead: Option[];
  dueRange: { first: string; last: string };
};

/** Makes a version of the saved draft and puts it before the owner. */
export function SendVersion({ send, orderNumber, revision, nextNumber, stagesAhead, dueRange }: SendVersionProps) {
  const [state, submit, isSending] = useActionState(send, fresh);
  const refused = refusalIn(state);
  return (
    <form action={submit} className="grid max-w-2xl gap-5">
      <HiddenFields values={{ orderNumber, revision: String(revision) }} />
      <div className="grid gap-5 sm:grid-cols-2">
        <TextInput
          label="To be signed by"
          name="dueOn"
          type="date"
          required
          min={dueRange.first}
          max={dueRange.last}
          defaultValue={refused?.values.dueOn}
          error={refused?.fields.dueOn}
        />
        <Select
          key={refused?.values.blocksStageKey}
          label="Must be signed before"
          name="blocksStageKey"
          prompt="holds nothing up"
          options={stagesAhead}
          defaultValue={refused?.values.blocksStageKey}
          error={refused?.fields.blocksStageKey}
        />
      </div>
      <TextArea
        label="Words to the owner"
        name="message"
        rows={3}
        maxLength={2000}
        isOptional
        defaultValue={refused?.values.message}
        error={refused?.fields.message}
      />
      <FormOutcome state={state} shown={['dueOn', 'blocksStageKey', 'message']} />
      <div>
        <Button type="submit" disabled={isSending}>
          Send version {nextNumber} to be signed
        </Button>
      </div>
    </form>
  );
}
