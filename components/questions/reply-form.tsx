'use client';

import { useRouter } from 'next/navigation';
import { useState, type FormEvent } from 'react';
import { LetterPhotos } from './letter-photos';
import { PhraseField, type FilledPhrase } from './phrase-field';
import { RefusedNotice } from './refused-notice';
import { useDraftForm, useIsBrowser } from './use-draft-form';
import { LazyNoteEditor } from '@/components/rich-text/lazy-note-editor';
import { Button } from '@/components/ui/button';
import { appendPhrase } from '@/lib/questions/append-phrase';
import { plainNote } from '@/lib/rich-text/plain-text';

type ReplyFormProps = {
  questionId: string;
  orderNumber: string;
  /** Drafts are kept for each person: a tab may see another one sign in. */
  viewerId: string;
  label: string;
  button: string;
  /** Who gets it by mail, as a sentence. */
  mailWords: string;
  /** Saved phrases with their fields filled in; none for the client side. */
  phrases: FilledPhrase[];
};

export function ReplyForm(props: ReplyFormProps) {
  const isBrowser = useIsBrowser();
  return <Form key={String(isBrowser)} isBrowser={isBrowser} {...props} />;
}

type FormProps = ReplyFormProps & { isBrowser: boolean };

function Form({ questionId, orderNumber, viewerId, isBrowser, label, button, mailWords, phrases }: FormProps) {
  const router = useRouter();
  const [isSent, setIsSent] = useState(false);
  const [insertions, setInsertions] = useState(0);
  const form = useDraftForm({ name: `letter/${viewerId}/${questionId}`, orderNumber, isBrowser });
  const { draft, change, photos, refused, isSending, isLocked } = form;

  async function submit(event: FormEvent) {
    event.preventDefault();
    setIsSent(false);
    const chosen = form.photosToSend();
    if (chosen === null) return;
    const { idempotencyKey, note } = draft;
    const letter = { idempotencyKey, note: note ?? plainNote(''), photos: chosen };
    const answer = await form.send(`/api/questions/${questionId}/letters`, letter);
    if (answer === null) return;
    setIsSent(true);
    router.refresh();
  }

  function insert(text: string) {
    change({ note: appendPhrase(draft.note, text) });
    setInsertions((count) => count + 1);
  }

  return (
    <form onSubmit={submit} className="grid gap-4">
      {phrases.length > 0 && <PhraseField phrases={phrases} isLocked={isLocked} onInsert={insert} />}
      <LazyNoteEditor
        key={`${draft.idempotencyKey} ${insertions}`}
        initial={draft.note ?? undefined}
        label={label}
        onChange={(note) => change({ note })}
        disabled={isLocked}
        invalid={refused?.fields.note}
      />
      <LetterPhotos photos={photos} error={refused?.fields.photos} isLocked={isLocked} />
      {!refused?.fields.note && !refused?.fields.photos && (
        <RefusedNotice refused={refused} shown={['note', 'photos']} />
      )}
      <div className="flex flex-wrap items-center justify-between gap-x-6 gap-y-3">
        <Button type="submit" disabled={isLocked} className="min-h-12 w-full sm:min-h-10 sm:w-auto">
          {isSending ? 'Sending' : button}
        </Button>
        <p className="text-sm text-soft">{mailWords}</p>
      </div>
      <p role="status" className="text-sm font-semibold text-finish-deep empty:hidden">
        {isSent && !refused ? 'Sent. For two minutes you can still correct it.' : ''}
      </p>
    </form>
  );
}
