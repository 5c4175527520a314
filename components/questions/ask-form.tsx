'use client';

import Link from 'next/link';
import { useRouter } from 'next/navigation';
import type { FormEvent, ReactNode } from 'react';
import { LetterPhotos } from './letter-photos';
import { RefusedNotice } from './refused-notice';
import { useDraftForm, useIsBrowser } from './use-draft-form';
import { LazyNoteEditor } from '@/components/rich-text/lazy-note-editor';
import { Button } from '@/components/ui/button';
import { Select } from '@/components/ui/select';
import { TextInput } from '@/components/ui/text-input';
import type { AskableTopic } from '@/db/queries/question-form';
import { partWords } from '@/lib/questions/people-words';
import { plainNote } from '@/lib/rich-text/plain-text';
import { wordIn } from '@/lib/send-json';

type AskFormProps = {
  orderNumber: string;
  /** Drafts are kept for each person: a tab may see another one sign in. */
  viewerId: string;
  topics: AskableTopic[];
  entryId: string | null;
  /** The entry asked about, shown above the fields. */
  quoted?: ReactNode;
};

const shownFields = ['topicId', 'subject', 'note', 'photos'];

export function AskForm(props: AskFormProps) {
  const isBrowser = useIsBrowser();
  return <Form key={String(isBrowser)} isBrowser={isBrowser} {...props} />;
}

function Form({ orderNumber, viewerId, topics, entryId, quoted, isBrowser }: AskFormProps & { isBrowser: boolean }) {
  const router = useRouter();
  const form = useDraftForm({ name: `question/${viewerId}/${orderNumber}`, orderNumber, isBrowser });
  const { draft, change, photos, refused, isSending, isLocked } = form;
  const topic = topics.find(({ id }) => id === draft.topicId);

  async function submit(event: FormEvent) {
    event.preventDefault();
    const chosen = form.photosToSend();
    if (chosen === null) return;
    const note = draft.note ?? plainNote('');
    const answer = await form.send('/api/questions', { ...draft, note, photos: chosen, orderNumber, entryId });
    const id = wordIn(answer, 'id');
    if (id) router.push(`/questions/${id}`);
  }

  return (
    <form onSubmit={submit} className="grid gap-6" noValidate>
      {quoted}
      <Select
        label="What is it about?"
        prompt="Choose a topic"
        options={topics.map(({ id, name }) => ({ value: id, label: name }))}
        value={topic ? topic.id : ''}
        onChange={(event) => change({ topicId: event.target.value })}
        disabled={isLocked}
        error={refused?.fields.topicId}
        hint={topic ? answererWords(topic) : 'It decides who answers you.'}
        className="max-w-md"
      />
      <TextInput
        label="Your question in a few words"
        value={draft.subject}
        onChange={(event) => change({ subject: event.target.value })}
        maxLength={120}
        disabled={isLocked}
        error={refused?.fields.subject}
      />
      <LazyNoteEditor
        key={draft.idempotencyKey}
        initial={draft.note ?? undefined}
        label="What would you like to know?"
        onChange={(note) => change({ note })}
        disabled={isLocked}
        invalid={refused?.fields.note}
      />
      <LetterPhotos photos={photos} error={refused?.fields.photos} isLocked={isLocked} />
      <RefusedNotice refused={refused} shown={shownFields} />
      <div className="flex flex-wrap items-center gap-x-5 gap-y-3">
        <Button type="submit" disabled={isLocked} className="min-h-12 w-full sm:min-h-10 sm:w-auto">
          {isSending ? 'Sending' : 'Send question'}
        </Button>
        <Link
          href={`/builds/${orderNumber}/questions`}
          className="inline-flex min-h-11 items-center font-semibold text-finish-deep hover:underline"
        >
          Not now
        </Link>
      </div>
    </form>
  );
}

function answererWords({ answerer, dueHours }: AskableTopic): string {
  if (!answerer)
    return 'Nobody on your build answers this just now. Ask all the same: the shop has it and finds somebody.';
  const hours = dueHours === 1 ? 'one working hour' : `${dueHours} working hours`;
  return `${answerer.name}, ${partWords(answerer)}, answers, as a rule within ${hours}, and gets it by mail.`;
}
