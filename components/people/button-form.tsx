'use client';

import { useActionState, type ComponentProps, type ReactNode } from 'react';
import { FormOutcome } from './form-outcome';
import { HiddenFields, type HiddenValues } from './hidden-fields';
import { Button } from '@/components/ui/button';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';

type ButtonFormProps = {
  send: FormAction;
  values?: HiddenValues;
  variant?: ComponentProps<typeof Button>['variant'];
  /** Says what the button is about where its own words would be one of many: "Try again: the mail to Ida". */
  name?: string;
  children: ReactNode;
};

/** A button that changes something by itself. */
export function ButtonForm({ send, values = {}, variant = 'quiet', name, children }: ButtonFormProps) {
  const [state, submit, isSending] = useActionState(send, fresh);
  return (
    <form action={submit} className="grid justify-items-start gap-3">
      <HiddenFields values={values} />
      <Button type="submit" variant={variant} disabled={isSending} aria-label={name}>
        {children}
      </Button>
      <FormOutcome state={state} />
    </form>
  );
}
