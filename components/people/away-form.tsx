'use client';

import { useActionState } from 'react';
import { FormOutcome, refusalIn } from './form-outcome';
import { Button } from '@/components/ui/button';
import { TextInput } from '@/components/ui/text-input';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';

/** `from` and `until` are the first and the last day away, as ISO dates; '' where there is none. */
type AwayFormProps = { save: FormAction; from: string; until: string };

export function AwayForm({ save, from, until }: AwayFormProps) {
  const [state, send, isSending] = useActionState(save, fresh);
  const refused = refusalIn(state);
  return (
    <form action={send} className="grid max-w-xl gap-4">
      <div className="grid gap-4 sm:grid-cols-2">
        <TextInput
          label="First day away"
          name="from"
          type="date"
          defaultValue={refused?.values.from ?? from}
          error={refused?.fields.from}
        />
        <TextInput
          label="Last day away"
          name="until"
          type="date"
          isOptional
          defaultValue={refused?.values.until ?? until}
          error={refused?.fields.until}
        />
      </div>
      <FormOutcome state={state} shown={['from', 'until']} />
      <div>
        <Button type="submit" disabled={isSending} className="min-h-11">
          Save
        </Button>
      </div>
    </form>
  );
}
