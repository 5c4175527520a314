'use client';

import { useActionState } from 'react';
import { FormOutcome, refusalIn } from '@/components/people/form-outcome';
import { HiddenFields } from '@/components/people/hidden-fields';
import { Button } from '@/components/ui/button';
import { TextInput } from '@/components/ui/text-input';
import type { DepartmentSetting } from '@/db/queries/shop-calendar';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';

/** How many builds a department can take in a week. */
export function CapacityForm({ save, department }: { save: FormAction; department: DepartmentSetting }) {
  const [state, send, isSending] = useActionState(save, fresh);
  const refused = refusalIn(state);
  return (
    <form action={send} className="grid gap-2">
      <HiddenFields values={{ department: department.key }} />
      <div className="grid grid-cols-[minmax(0,1fr)_auto] items-end gap-3">
        <TextInput
          id={`capacity-${department.key.replaceAll(' ', '-')}`}
          label={department.name}
          name="capacityPerWeek"
          inputMode="numeric"
          defaultValue={refused?.values.capacityPerWeek ?? department.capacityPerWeek ?? ''}
          error={refused?.fields.capacityPerWeek}
        />
        <Button
          type="submit"
          variant="quiet"
          disabled={isSending}
          aria-label={`Save ${department.name}`}
          className="min-h-11"
        >
          Save
        </Button>
      </div>
      <FormOutcome state={state} shown={['capacityPerWeek']} />
    </form>
  );
}
