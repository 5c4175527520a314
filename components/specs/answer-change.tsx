'use client';

import { useActionState } from 'react';
import { FormOutcome, refusalIn } from '@/components/people/form-outcome';
import { HiddenFields } from '@/components/people/hidden-fields';
import { Button } from '@/components/ui/button';
import { TextArea, TextInput } from '@/components/ui/text-input';
import type { ChangeRequestRow } from '@/db/queries/change-requests';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';

type OfferProps = { offer: FormAction; change: ChangeRequestRow; dueRange: { first: string; last: string } };

/** Price and days for a wish; the owner signs them. */
export function OfferChange({ offer, change, dueRange }: OfferProps) {
  const [state, send, isSending] = useActionState(offer, fresh);
  const refused = refusalIn(state);
  const said = refused?.values;
  const { priceCents, extraDays } = change;
  return (
    <form action={send} className="grid content-start gap-4">
      <HiddenFields values={{ requestId: change.id }} />
      <div className="grid grid-cols-2 gap-4">
        <TextInput
          label="Price, in dollars"
          name="price"
          inputMode="decimal"
          required
          defaultValue={said?.price ?? (priceCents === null ? '' : (priceCents / 100).toFixed(2))}
          error={refused?.fields.price}
        />
        <TextInput
          label="Working days more"
          name="extraDays"
          inputMode="numeric"
          required
          defaultValue={said?.extraDays ?? extraDays?.toString() ?? ''}
          error={refused?.fields.extraDays}
        />
      </div>
      <TextInput
        label="To be signed by"
        name="dueOn"
        type="date"
        required
        min={dueRange.first}
        max={dueRange.last}
        defaultValue={said?.dueOn}
        error={refused?.fields.dueOn}
        className="max-w-52"
      />
      <TextArea
        label="Words to the owner"
        name="message"
        rows={3}
        maxLength={2000}
        isOptional
        defaultValue={said?.message}
        error={refused?.fields.message}
      />
      <FormOutcome state={state} shown={['price', 'extraDays', 'dueOn', 'message']} />
      <div>
        <Button type="submit" disabled={isSending}>
          {change.state === 'offered' ? 'Offer it anew' : 'Offer it'}
        </Button>
      </div>
    </form>
  );
}

export function DeclineChange({ decline, requestId }: { decline: FormAction; requestId: string }) {
  const [state, send, isSending] = useActionState(decline, fresh);
  const refused = refusalIn(state);
  return (
    <form action={send} className="grid content-start gap-4">
      <HiddenFields values={{ requestId }} />
      <TextArea
        label="Or why it cannot be done"
        name="answer"
        rows={3}
        maxLength={1000}
        required
        defaultValue={refused?.values.answer}
        error={refused?.fields.answer}
      />
      <FormOutcome state={state} shown={['answer']} />
      <div>
        <Button type="submit" variant="quiet" disabled={isSending}>
          Decline it
        </Button>
      </div>
    </form>
  );
}
