'use client';

import { useActionState } from 'react';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { TextInput } from '@/components/ui/text-input';
import { fresh, type FormState } from '@/lib/form-state';

type Ask = (previous: FormState, form: FormData) => Promise<FormState>;

export function AskForm({ ask, address }: { ask: Ask; address: string }) {
  const [state, send, isSending] = useActionState(ask, fresh);
  const refused = state.state === 'refused' ? state : null;
  return (
    <form action={send} className="grid max-w-md gap-4">
      <TextInput
        label="Your mail address"
        name="address"
        type="email"
        autoComplete="email"
        required
        defaultValue={refused?.values.address ?? address}
        error={refused?.fields.address}
        hint="The one your invitation came to. We mail you a link; there is no password."
        controlSize="bench"
      />
      {refused && !refused.fields.address && (
        <Notice tone="late" role="alert">
          {refused.message}
        </Notice>
      )}
      <Button type="submit" size="bench" disabled={isSending}>
        {isSending ? 'Sending the link' : 'Mail me a link'}
      </Button>
    </form>
  );
}
