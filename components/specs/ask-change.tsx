'use client';

import { useActionState } from 'react';
import { FormOutcome, refusalIn } from '@/components/people/form-outcome';
import { HiddenFields } from '@/components/people/hidden-fields';
import { Button } from '@/components/ui/button';
import { Select, type Option } from '@/components/ui/select';
import { TextArea } from '@/components/ui/text-input';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';

type AskChangeProps = { ask: FormAction; orderNumber: string; items: Option[]; chosen: string };

/** The owner's wish for something that is frozen. */
export function AskChange({ ask, orderNumber, items, chosen }: AskChangeProps) {
  const [state, send, isSending] = useActionState(ask, fresh);
  const refused = refusalIn(state);
  return (
    <form action={send} className="grid gap-5">
      <HiddenFields values={{ orderNumber }} />
      <Select
        key={refused?.values.itemKey}
        label="What should change?"
        name="itemKey"
        prompt="Choose an item"
        options={items}
        defaultValue={refused?.values.itemKey ?? chosen}
        error={refused?.fields.itemKey}
        className="max-w-md"
      />
      <TextArea
        label="What would you like instead?"
        name="wish"
        maxLength={1000}
        required
        hint="Asking costs nothing and binds nobody. You sign before anything is done."
        defaultValue={refused?.values.wish}
        error={refused?.fields.wish}
      />
      <FormOutcome state={state} shown={['itemKey', 'wish']} />
      <div>
        <Button type="submit" disabled={isSending}>
          Ask the shop
        </Button>
      </div>
    </form>
  );
}
