'use client';

import { useActionState } from 'react';
import { FormOutcome, refusalIn } from '@/components/people/form-outcome';
import { HiddenFields } from '@/components/people/hidden-fields';
import { Button } from '@/components/ui/button';
import { TextArea } from '@/components/ui/text-input';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';

/** An admin opens a build to themselves and says why. */
export function StepInForm({ stepIn, orderNumber }: { stepIn: FormAction; orderNumber: string }) {
  const [state, send, isSending] = useActionState(stepIn, fresh);
  const refused = refusalIn(state);
  return (
    <form action={send} className="grid gap-4">
      <HiddenFields values={{ orderNumber }} />
      <TextArea
        label="Why you step in"
        name="reason"
        required
        rows={3}
        maxLength={300}
        hint="The owner of the build can read this, with your name and the date."
        defaultValue={refused?.values.reason}
        error={refused?.fields.reason}
      />
      <FormOutcome state={state} shown={['reason']} />
      <div>
        <Button type="submit" variant="quiet" disabled={isSending}>
          Step in and open the diary
        </Button>
      </div>
    </form>
  );
}
