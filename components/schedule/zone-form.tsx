'use client';

import { useActionState } from 'react';
import { FormOutcome, refusalIn } from '@/components/people/form-outcome';
import { Button } from '@/components/ui/button';
import { TextInput } from '@/components/ui/text-input';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';

/** Whose clock the shop goes by. */
export function ShopZoneForm({ save, zone }: { save: FormAction; zone: string }) {
  const [state, send, isSending] = useActionState(save, fresh);
  const refused = refusalIn(state);
  return (
    <form action={send} className="grid gap-3">
      <TextInput
        label="Time zone of the shop"
        hint="By its place, such as America/Chicago."
        name="zone"
        defaultValue={refused?.values.zone ?? zone}
        error={refused?.fields.zone}
      />
      <FormOutcome state={state} shown={['zone']} />
      <div>
        <Button type="submit" variant="quiet" disabled={isSending}>
          Save the zone
        </Button>
      </div>
    </form>
  );
}
