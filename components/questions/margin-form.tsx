'use client';

import { useRouter } from 'next/navigation';
import { useId, type FormEvent } from 'react';
import { RefusedNotice } from './refused-notice';
import { useDraftForm, useIsBrowser } from './use-draft-form';
import { Button } from '@/components/ui/button';
import { TextArea } from '@/components/ui/text-input';
import { noteText, plainNote } from '@/lib/rich-text/plain-text';

type MarginFormProps = { questionId: string; viewerId: string };

export function MarginForm(props: MarginFormProps) {
  const isBrowser = useIsBrowser();
  return <Form key={String(isBrowser)} isBrowser={isBrowser} {...props} />;
}

/** A line for the shop only. Nobody is mailed. */
function Form({ questionId, viewerId, isBrowser }: MarginFormProps & { isBrowser: boolean }) {
  const router = useRouter();
  const id = useId();
  const form = useDraftForm({ name: `margin/${viewerId}/${questionId}`, orderNumber: '', isBrowser });
  const { draft, change, refused, isSending, isLocked } = form;

  async function submit(event: FormEvent) {
    event.preventDefault();
    const { idempotencyKey, note } = draft;
    const door = `/api/questions/${questionId}/margin`;
    if ((await form.send(door, { idempotencyKey, note: note ?? plainNote('') })) !== null) router.refresh();
  }

  return (
    <form onSubmit={submit} className="mt-7 grid justify-items-start gap-3">
      <TextArea
        id={id}
        label="Write in the margin"
        rows={3}
        className="w-full [&_textarea]:italic"
        value={draft.note ? noteText(draft.note) : ''}
        onChange={(event) => change({ note: plainNote(event.target.value) })}
        disabled={isLocked}
        error={refused?.fields.note}
      />
      {!refused?.fields.note && <RefusedNotice refused={refused} shown={['note']} />}
      <Button type="submit" variant="quiet" disabled={isLocked} className="min-h-11">
        {isSending ? 'Keeping' : 'Keep for the shop'}
      </Button>
    </form>
  );
}
