'use client';

import { useState } from 'react';
import type { EditState } from './save-edit';
import { Button, LinkButton } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import type { NoteDoc } from '@/lib/rich-text/doc';
import { noteText } from '@/lib/rich-text/plain-text';

type EditTroubleProps = { state: EditState; note: NoteDoc | null; href: string };

/** Why a note was not saved, and the way on; what was typed stays in the field above. */
export function EditTrouble({ state, note, href }: EditTroubleProps) {
  if (!('message' in state)) return null;
  return (
    <Notice tone="late" role="alert">
      <p>{state.message}</p>
      {state.step === 'conflict' && (
        <div className="mt-3 flex flex-wrap gap-3">
          {note && <CopyWords note={note} />}
          <LinkButton variant="quiet" size="bench" href={href} target="_blank">
            Open the newest in a new tab
          </LinkButton>
        </div>
      )}
      {state.step === 'signed-out' && (
        <LinkButton variant="quiet" size="bench" href="/sign-in" target="_blank" className="mt-3">
          Sign in
        </LinkButton>
      )}
    </Notice>
  );
}

function CopyWords({ note }: { note: NoteDoc }) {
  const [result, setResult] = useState<'none' | 'copied' | 'failed'>('none');
  async function copy() {
    try {
      await navigator.clipboard.writeText(noteText(note));
      setResult('copied');
    } catch {
      setResult('failed');
    }
  }
  return (
    <div>
      <Button size="bench" onClick={() => void copy()}>
        {result === 'copied' ? 'Copied' : 'Copy my words'}
      </Button>
      {result === 'failed' && (
        <p className="mt-1">Copying is blocked here. Mark the words above and copy them by hand.</p>
      )}
    </div>
  );
}
