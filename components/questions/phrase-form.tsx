'use client';

import { useActionState } from 'react';
import { FormOutcome, refusalIn } from '@/components/people/form-outcome';
import { HiddenFields } from '@/components/people/hidden-fields';
import { Button } from '@/components/ui/button';
import { Select } from '@/components/ui/select';
import { TextArea, TextInput } from '@/components/ui/text-input';
import type { PhraseRow } from '@/db/queries/phrases';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';

type PhraseFormProps = { keep: FormAction; mayKeepShop: boolean; phrase?: PhraseRow };

const whose = [
  { value: 'mine', label: 'Only I use it' },
  { value: 'shop', label: 'The whole shop uses it' },
];

/** Writes a phrase, a new one or another text for a kept one. */
export function PhraseForm({ keep, mayKeepShop, phrase }: PhraseFormProps) {
  const [state, send, isSending] = useActionState(keep, fresh);
  const refused = refusalIn(state);
  const typed = refused?.values ?? {};
  const owner = typed.whose ?? phrase?.whose ?? 'mine';
  return (
    <form action={send} className="grid gap-4">
      <HiddenFields values={{ phraseId: phrase?.id ?? '', ...(mayKeepShop ? {} : { whose: 'mine' }) }} />
      <TextInput
        label="Its name"
        name="title"
        required
        maxLength={80}
        autoComplete="off"
        defaultValue={typed.title ?? phrase?.title}
        error={refused?.fields.title}
      />
      <TextArea
        label="Its words"
        name="words"
        required
        rows={4}
        maxLength={2000}
        defaultValue={typed.words ?? phrase?.words}
        error={refused?.fields.words}
      />
      {mayKeepShop && (
        <Select
          key={owner}
          label="Who uses it"
          name="whose"
          options={whose}
          defaultValue={owner}
          error={refused?.fields.whose}
        />
      )}
      <FormOutcome state={state} shown={['title', 'words', ...(mayKeepShop ? ['whose'] : [])]} />
      <div>
        <Button type="submit" disabled={isSending} className="min-h-11">
          Keep it
        </Button>
      </div>
    </form>
  );
}
