'use client';

import { useActionState } from 'react';
import { ButtonForm } from '@/components/people/button-form';
import { FormOutcome, refusalIn } from '@/components/people/form-outcome';
import { HiddenFields } from '@/components/people/hidden-fields';
import { Button } from '@/components/ui/button';
import { TextArea } from '@/components/ui/text-input';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';

type TellFormProps = { tell: FormAction; keep: FormAction; orderNumber: string; runId: string };

/** The rep's own words to the player about a failed inspection, or none. */
export function TellForm({ tell, keep, orderNumber, runId }: TellFormProps) {
  const [state, send, isSending] = useActionState(tell, fresh);
  const refused = refusalIn(state);
  const values = { orderNumber, runId };
  return (
    <div className="mt-3 grid gap-3">
      <form action={send} className="grid gap-3">
        <HiddenFields values={values} />
        <TextArea
          label="In your words"
          name="words"
          required
          rows={3}
          maxLength={2000}
          hint="Becomes an entry of the diary under your name."
          defaultValue={refused?.values.words}
          error={refused?.fields.words}
        />
        <FormOutcome state={state} shown={['words']} />
        <div>
          <Button type="submit" disabled={isSending}>
            Tell the player
          </Button>
        </div>
      </form>
      <ButtonForm send={keep} values={values}>
        Keep it in the shop
      </ButtonForm>
    </div>
  );
}
