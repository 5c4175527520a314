'use client';

import { useActionState } from 'react';
import { FormOutcome, refusalIn } from '@/components/people/form-outcome';
import { HiddenFields } from '@/components/people/hidden-fields';
import { workWords } from '@/components/people/person-words';
import { Button } from '@/components/ui/button';
import { Select } from '@/components/ui/select';
import type { Role } from '@/lib/access';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';

type NamedPersonFormProps = {
  save: FormAction;
  label: string;
  /** The name under which the person's id is sent. */
  field: string;
  values?: Record<string, string>;
  chosenId: string | null;
  staff: { id: string; name: string; role: Role; department: string | null }[];
  hint?: string;
};

/** Names one person at the shop for something, or nobody. */
export function NamedPersonForm({ save, label, field, values = {}, chosenId, staff, hint }: NamedPersonFormProps) {
  const [state, send, isSending] = useActionState(save, fresh);
  const chosen = refusalIn(state)?.values[field] ?? chosenId ?? '';
  return (
    <form action={send} className="grid gap-2">
      <HiddenFields values={values} />
      <div className="flex items-end gap-2">
        <Select
          key={chosen}
          label={label}
          name={field}
          hint={hint}
          prompt="Nobody"
          options={staff.map((person) => ({ value: person.id, label: `${person.name}, ${workWords(person)}` }))}
          defaultValue={chosen}
          error={refusalIn(state)?.fields[field]}
          className="min-w-0 flex-1"
        />
        <Button type="submit" variant="quiet" disabled={isSending} aria-label={`Keep: ${label}`} className="min-h-11">
          Keep
        </Button>
      </div>
      <FormOutcome state={state} shown={[field]} />
    </form>
  );
}
