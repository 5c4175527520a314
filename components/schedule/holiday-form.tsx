'use client';

import { useActionState } from 'react';
import { FormOutcome, refusalIn } from '@/components/people/form-outcome';
import { Button } from '@/components/ui/button';
import { Select } from '@/components/ui/select';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';

type Place = { code: string; name: string };
type HolidayFormProps = {
  save: FormAction;
  countries: readonly Place[];
  /** Of the country that is saved. */
  regions: readonly Place[];
  country: string | null;
  region: string | null;
};

const options = (places: readonly Place[]) => places.map(({ code, name }) => ({ value: code, label: name }));

/** Whose public holidays the shop keeps: this year's and those of the next two. */
export function HolidayForm({ save, countries, regions, country, region }: HolidayFormProps) {
  const [state, send, isSending] = useActionState(save, fresh);
  const refused = refusalIn(state);
  return (
    <form action={send} className="grid gap-3">
      <Select
        label="Country"
        name="country"
        prompt="None: no public holidays"
        options={options(countries)}
        defaultValue={refused?.values.country ?? country ?? ''}
        error={refused?.fields.country}
      />
      {regions.length > 0 && (
        <Select
          label="Region"
          name="region"
          prompt="Only those of the whole country"
          options={options(regions)}
          defaultValue={refused?.values.region ?? region ?? ''}
        />
      )}
      <FormOutcome state={state} shown={['country']} />
      <div>
        <Button type="submit" variant="quiet" disabled={isSending}>
          Take its holidays
        </Button>
      </div>
    </form>
  );
}
