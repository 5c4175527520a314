'use client';

import { useActionState } from 'react';
import { FormOutcome, refusalIn } from './form-outcome';
import { HiddenFields } from './hidden-fields';
import { Button } from '@/components/ui/button';
import { TextInput } from '@/components/ui/text-input';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';

type HoldFormProps = {
  hold: FormAction;
  orderNumber: string;
  /** The days it may end on, as ISO dates. */
  range: { first: string; last: string };
  isHeld: boolean;
  placeWords: string;
};

export function HoldForm({ hold, orderNumber, range, isHeld, placeWords }: HoldFormProps) {
  const [state, send, isSending] = useActionState(hold, fresh);
  const refused = refusalIn(state);
  return (
    <form action={send} className="grid max-w-md gap-4">
      <HiddenFields values={{ orderNumber }} />
      <TextInput
        label={isHeld ? 'Hold it until another day' : 'Hold it until'}
        name="until"
        type="date"
        required
        min={range.first}
        max={range.last}
        hint={`It opens by itself as that day begins, ${placeWords} time.`}
        defaultValue={refused?.values.until}
        error={refused?.fields.until}
      />
      <FormOutcome state={state} shown={['until']} />
      <div>
        <Button type="submit" disabled={isSending}>
          {isHeld ? 'Change the day' : 'Hold it from view'}
        </Button>
      </div>
    </form>
  );
}
