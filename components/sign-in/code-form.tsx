'use client';

import { useState, type SubmitEvent } from 'react';
import { openDoor } from './open-door';
import { Button } from '@/components/ui/button';
import { TextInput } from '@/components/ui/text-input';

/** For those who read their mail on another device: the code from it signs this browser in. */
export function CodeForm() {
  const [problem, setProblem] = useState<string>();
  const [isSending, setIsSending] = useState(false);

  async function send(event: SubmitEvent<HTMLFormElement>) {
    event.preventDefault();
    const code = String(new FormData(event.currentTarget).get('code') ?? '').replace(/\s/g, '');
    if (!/^\d{6}$/.test(code)) return setProblem('The code is the six digits from the mail.');
    setIsSending(true);
    const opened = await openDoor({ code });
    if (opened.ok) return window.location.assign('/');
    setProblem(opened.message);
    setIsSending(false);
  }

  return (
    <form onSubmit={send} className="grid max-w-md gap-4 border-t-2 border-ink pt-5" noValidate>
      <TextInput
        label="Reading your mail on another device? Type its code here"
        name="code"
        inputMode="numeric"
        autoComplete="one-time-code"
        error={problem}
        controlSize="bench"
      />
      <Button type="submit" variant="quiet" size="bench" disabled={isSending}>
        {isSending ? 'Signing in' : 'Sign in with the code'}
      </Button>
    </form>
  );
}
