'use client';

import { useActionState } from 'react';
import { FormOutcome, refusalIn } from './form-outcome';
import { HiddenFields } from './hidden-fields';
import { Button } from '@/components/ui/button';
import { TextInput } from '@/components/ui/text-input';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';

/** The owner asks somebody to look on. */
export function CompanionForm({ add, orderNumber }: { add: FormAction; orderNumber: string }) {
  const [state, send, isSending] = useActionState(add, fresh);
  const refused = refusalIn(state);
  return (
    <form action={send} className="grid max-w-md gap-4">
      <HiddenFields values={{ orderNumber }} />
      <TextInput
        label="Their name"
        name="name"
        required
        maxLength={200}
        autoComplete="off"
        defaultValue={refused?.values.name}
        error={refused?.fields.name}
      />
      <TextInput
        label="Their mail address"
        name="email"
        type="email"
        required
        maxLength={254}
        autoComplete="off"
        hint="If it is new to us, an invitation goes there."
        defaultValue={refused?.values.email}
        error={refused?.fields.email}
      />
      <FormOutcome state={state} shown={['name', 'email']} />
      <div>
        <Button type="submit" disabled={isSending}>
          Let them look on
        </Button>
      </div>
    </form>
  );
}
