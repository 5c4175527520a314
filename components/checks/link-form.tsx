'use client';

import { useActionState } from 'react';
import { FormOutcome, refusalIn } from '@/components/people/form-outcome';
import { HiddenFields } from '@/components/people/hidden-fields';
import { Button } from '@/components/ui/button';
import { Select, type Option } from '@/components/ui/select';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';

type LinkFormProps = { link: FormAction; orderNumber: string; items: Option[]; entries: Option[] };

/** Says after the fact that an entry shows an item. */
export function LinkForm({ link, orderNumber, items, entries }: LinkFormProps) {
  const [state, send, isSending] = useActionState(link, fresh);
  const refused = refusalIn(state);
  return (
    <form action={send} className="grid max-w-xl gap-4">
      <HiddenFields values={{ orderNumber }} />
      <Select
        label="Item"
        name="itemKey"
        required
        prompt="Choose an item"
        options={items}
        defaultValue={refused?.values.itemKey}
        error={refused?.fields.itemKey}
      />
      <Select
        label="Entry that shows it"
        name="entryId"
        required
        prompt="Choose an entry"
        options={entries}
        defaultValue={refused?.values.entryId}
        error={refused?.fields.entryId}
      />
      <FormOutcome state={state} shown={['itemKey', 'entryId']} />
      <div>
        <Button type="submit" variant="quiet" disabled={isSending}>
          Link it as proof
        </Button>
      </div>
    </form>
  );
}
