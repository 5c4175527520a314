'use client';

import { useActionState } from 'react';
import { FormOutcome, refusalIn } from '@/components/people/form-outcome';
import { HiddenFields } from '@/components/people/hidden-fields';
import { Button } from '@/components/ui/button';
import { TextInput } from '@/components/ui/text-input';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';

type ShipFormProps = { ship: FormAction; orderNumber: string; shippedBy: string | null };

/** Who carries the build and under which number, for its owner; sent again it corrects the words. */
export function ShipForm({ ship, orderNumber, shippedBy }: ShipFormProps) {
  const [state, send, isSending] = useActionState(ship, fresh);
  const refused = refusalIn(state);
  return (
    <form action={send} className="grid max-w-xl gap-4">
      <HiddenFields values={{ orderNumber }} />
      <TextInput
        label="Carrier"
        name="carrier"
        required
        maxLength={60}
        hint={shippedBy ? `The owner reads “${shippedBy}” now.` : 'The owner reads it, and gets a mail.'}
        defaultValue={refused?.values.carrier}
        error={refused?.fields.carrier}
      />
      <TextInput
        label="Number to follow it by"
        name="number"
        isOptional
        maxLength={60}
        defaultValue={refused?.values.number}
        error={refused?.fields.number}
      />
      <FormOutcome state={state} shown={['carrier', 'number']} />
      <div>
        <Button type="submit" variant={shippedBy ? 'quiet' : 'primary'} disabled={isSending}>
          {shippedBy ? 'Correct it' : 'It has been shipped'}
        </Button>
      </div>
    </form>
  );
}
