'use client';

import { useRouter } from 'next/navigation';
import { useState, type FormEvent } from 'react';
import { RefusedNotice } from './refused-notice';
import { useDraftForm, useIsBrowser } from './use-draft-form';
import { LazyNoteEditor } from '@/components/rich-text/lazy-note-editor';
import { Button } from '@/components/ui/button';
import { plainNote } from '@/lib/rich-text/plain-text';

type ReplyFormProps = {
  questionId: string;
  /** Drafts are kept for each person: a tab may see another one sign in. */
  viewerId: string;
  label: string;
  button: string;
  /** Who gets it by mail, as a sentence. */
  mailWords: string;
};

export function ReplyForm(props: ReplyFormProps) {
  const isBrowser = useIsBrowser();
  return <Form key={String(isBrowser)} isBrowser={isBrowser} {...props} />;
}

function Form({ questionId, viewerId, isBrowser, label, button, mailWords }: ReplyFormProps & { isBrowser: boolean }) {
  const router = useRouter();
  const [isSent, setIsSent] = useState(false);
  const { draft, change, send, refused, isSending } = useDraftForm(`letter/${viewerId}/${questionId}`, isBrowser);

  async function submit(event: FormEvent) {
    event.preventDefault();
    setIsSent(false);
    const { idempotencyKey, note } = draft;
    const answer = await send(`/api/questions/${questionId}/letters`, {
      idempotencyKey,
      note: note ?? plainNote(''),
    });
    if (answer === null) return;
    setIsSent(true);
    router.refresh();
  }

  return (
    <form onSubmit={submit} className="grid gap-4">
      <LazyNoteEditor
        key={draft.idempotencyKey}
        initial={draft.note ?? undefined}
        label={label}
        onChange={(note) => change({ note })}
        disabled={isSending}
        invalid={refused?.fields.note}
      />
      {!refused?.fields.note && <RefusedNotice refused={refused} shown={['note']} />}
      <div className="flex flex-wrap items-center justify-between gap-x-6 gap-y-3">
        <Button type="submit" size="normal" disabled={isSending} className="min-h-12 w-full sm:min-h-10 sm:w-auto">
          {isSending ? 'Sending' : button}
        </Button>
        <p className="text-sm text-soft">{mailWords}</p>
      </div>
      <p role="status" className="text-sm font-semibold text-finish-deep empty:hidden">
        {isSent && !refused ? 'Sent.' : ''}
      </p>
    </form>
  );
}
