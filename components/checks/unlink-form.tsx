'use client';

import { useActionState } from 'react';
import { FormOutcome } from '@/components/people/form-outcome';
import { HiddenFields } from '@/components/people/hidden-fields';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';

/** Takes an entry away from an item that it does not show. */
export function UnlinkForm({ unlink, values }: { unlink: FormAction; values: Record<string, string> }) {
  const [state, send, isSending] = useActionState(unlink, fresh);
  return (
    <form action={send}>
      <HiddenFields values={values} />
      <button type="submit" disabled={isSending} className="min-h-6 text-sm text-soft underline disabled:opacity-55">
        not this one
      </button>
      <FormOutcome state={state} />
    </form>
  );
}
