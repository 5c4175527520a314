'use client';

import { useRouter } from 'next/navigation';
import { useEffect, useState } from 'react';
import { EditTrouble } from './edit-trouble';
import { saveEdit, type EditState } from './save-edit';
import { LazyNoteEditor } from '@/components/rich-text/lazy-note-editor';
import { Button } from '@/components/ui/button';
import type { NoteDoc } from '@/lib/rich-text/doc';

type EditFormProps = { orderNumber: string; entryId: string; revision: number; body: unknown };

/** Changes the words of an entry that is in the diary. */
export function EditForm({ orderNumber, entryId, revision, body }: EditFormProps) {
  const router = useRouter();
  const [note, setNote] = useState<NoteDoc | null>(null);
  const [state, setState] = useState<EditState>({ step: 'writing' });
  const isBusy = state.step === 'saving' || state.step === 'saved';
  useLeaveWarning(note !== null && state.step !== 'saved');

  async function save() {
    const here = `/builds/${orderNumber}#entry-${entryId}`;
    if (!note) return router.push(here);
    setState({ step: 'saving' });
    const outcome = await saveEdit(entryId, revision, note);
    setState(outcome);
    if (outcome.step === 'saved') router.push(here);
  }

  return (
    <div className="mx-auto grid max-w-2xl gap-5 px-4.5 pt-6 pb-12">
      <LazyNoteEditor
        key={`${entryId}/${revision}`}
        initial={body}
        label="Note"
        onChange={setNote}
        disabled={isBusy}
        invalid={state.step === 'refused' ? state.note : undefined}
      />
      <p className="text-soft">
        Photos and readings stay as they were posted. To change a reading, withdraw the entry and post it again.
      </p>
      <EditTrouble state={state} note={note} href={`/bench/${orderNumber}/entries/${entryId}`} />
      <Button size="bench" isWide disabled={isBusy} onClick={() => void save()}>
        {state.step === 'saving' ? 'Saving' : 'Save the note'}
      </Button>
      <p role="status" className="text-center text-soft empty:hidden">
        {state.step === 'saved' && 'Saved. The diary opens.'}
      </p>
    </div>
  );
}

/** The browser asks before a page with unsaved words is closed or reloaded. */
function useLeaveWarning(isDue: boolean): void {
  useEffect(() => {
    if (!isDue) return;
    const warn = (event: BeforeUnloadEvent) => event.preventDefault();
    window.addEventListener('beforeunload', warn);
    return () => window.removeEventListener('beforeunload', warn);
  }, [isDue]);
}
