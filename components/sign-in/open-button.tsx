'use client';

import { useState } from 'react';
import { openDoor } from './open-door';
import { Button, LinkButton } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';

/** The token stands in the address's fragment, which no server sees, and is used only when a person presses this. */
export function OpenButton() {
  const [problem, setProblem] = useState<string>();
  const [isSending, setIsSending] = useState(false);

  async function open() {
    setIsSending(true);
    const opened = await openDoor({ token: window.location.hash.slice(1) });
    if (opened.ok) return window.location.assign('/');
    setProblem(opened.message);
    setIsSending(false);
  }

  return (
    <div className="grid max-w-md gap-4">
      {problem ? (
        <Notice tone="late" role="alert" action={<LinkButton href="/sign-in">Ask for a new link</LinkButton>}>
          {problem}
        </Notice>
      ) : (
        <Button size="bench" onClick={open} disabled={isSending}>
          {isSending ? 'Signing in' : 'Sign in'}
        </Button>
      )}
    </div>
  );
}
