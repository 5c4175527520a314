'use client';

import { useActionState } from 'react';
import { FormOutcome, refusalIn } from '@/components/people/form-outcome';
import { HiddenFields } from '@/components/people/hidden-fields';
import { Button } from '@/components/ui/button';
import { Select, type Option } from '@/components/ui/select';
import { TextArea, TextInput } from '@/components/ui/text-input';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';

type ConcessionFormProps = {
  ask: FormAction;
  orderNumber: string;
  items: Option[];
  /** The days it may be asked for by, as ISO dates. */
  range: { first: string; last: string };
};

/** A rep asks the owner to let an item pass as it came out. */
export function ConcessionForm({ ask, orderNumber, items, range }: ConcessionFormProps) {
  const [state, send, isSending] = useActionState(ask, fresh);
  const refused = refusalIn(state);
  return (
    <form action={send} className="grid max-w-xl gap-4">
      <HiddenFields values={{ orderNumber }} />
      <Select
        label="Item"
        name="itemKey"
        required
        prompt="Choose an item"
        options={items}
        defaultValue={refused?.values.itemKey}
        error={refused?.fields.itemKey}
      />
      <TextArea
        label="Why it is good as it is"
        name="reason"
        required
        rows={3}
        maxLength={500}
        hint="The owner reads this beside the signed and the measured value, and signs all three."
        defaultValue={refused?.values.reason}
        error={refused?.fields.reason}
      />
      <TextInput
        label="Sign by"
        name="dueOn"
        type="date"
        required
        min={range.first}
        max={range.last}
        defaultValue={refused?.values.dueOn}
        error={refused?.fields.dueOn}
      />
      <FormOutcome state={state} shown={['itemKey', 'reason', 'dueOn']} />
      <div>
        <Button type="submit" variant="quiet" disabled={isSending}>
          Ask the owner
        </Button>
      </div>
    </form>
  );
}
