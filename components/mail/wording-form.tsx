'use client';

import { useActionState } from 'react';
import { FormOutcome, refusalIn } from '@/components/people/form-outcome';
import { Button } from '@/components/ui/button';
import { Select } from '@/components/ui/select';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';
import { localeOptions } from '@/lib/mail/locales';

const units = [
  { value: 'in', label: 'Inches' },
  { value: 'mm', label: 'Millimetres' },
];

type WordingFormProps = { save: FormAction; locale: string; units: string };

/** How dates and measures are written to this person. */
export function WordingForm({ save, locale, units: unit }: WordingFormProps) {
  const [state, send, isSending] = useActionState(save, fresh);
  const refused = refusalIn(state);
  const chosen = { locale: refused?.values.locale ?? locale, units: refused?.values.units ?? unit };
  return (
    <form action={send} className="grid max-w-xl gap-6">
      <div className="grid gap-6 sm:grid-cols-2">
        <Select
          key={chosen.locale}
          label="Dates in mail"
          name="locale"
          options={localeOptions}
          defaultValue={chosen.locale}
          error={refused?.fields.locale}
        />
        <Select
          key={chosen.units}
          label="Measures"
          name="units"
          options={units}
          defaultValue={chosen.units}
          error={refused?.fields.units}
        />
      </div>
      <FormOutcome state={state} shown={['locale', 'units']} />
      <div>
        <Button type="submit" disabled={isSending}>
          Save
        </Button>
      </div>
    </form>
  );
}
