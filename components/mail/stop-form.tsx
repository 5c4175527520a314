'use client';

import { useActionState } from 'react';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { fresh, type FormState } from '@/lib/form-state';

type Stop = (previous: FormState, form: FormData) => Promise<FormState>;

export function StopForm({ stop, token }: { stop: Stop; token: string }) {
  const [state, send, isSending] = useActionState(stop, fresh);
  if (state.state === 'done')
    return (
      <Notice tone="done" role="status">
        {state.message}
      </Notice>
    );
  return (
    <form action={send} className="grid gap-4">
      <input type="hidden" name="token" value={token} />
      {state.state === 'refused' && (
        <Notice tone="late" role="alert">
          {state.message}
        </Notice>
      )}
      <div>
        <Button type="submit" disabled={isSending}>
          Stop the diary mails
        </Button>
      </div>
    </form>
  );
}
