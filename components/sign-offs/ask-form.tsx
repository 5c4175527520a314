'use client';

import { useActionState } from 'react';
import { FileField } from './file-field';
import { useSignedFile } from './use-signed-file';
import { FormOutcome, refusalIn } from '@/components/people/form-outcome';
import { HiddenFields } from '@/components/people/hidden-fields';
import { Button } from '@/components/ui/button';
import { Segmented } from '@/components/ui/segmented';
import { Select, type Option } from '@/components/ui/select';
import { TextArea, TextInput } from '@/components/ui/text-input';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';

export type AskFormProps = {
  send: FormAction;
  orderNumber: string;
  /** The days it may be asked for by, as yyyy-mm-dd. */
  range: { first: string; last: string };
  /** Stages that have not begun. */
  stages: Option[];
  /** Spec items that are a look. */
  items: Option[];
  /** What this one takes the place of. */
  replaced?: {
    id: string;
    kind: 'drawing' | 'sample';
    itemKey: string | null;
    blocksStageKey: string | null;
    title: string;
    /** What the owner wanted to be different. */
    answer: string | null;
  };
};

const shown = ['kind', 'file', 'title', 'message', 'dueOn', 'blocksStageKey', 'itemKey'];

/** A rep puts a drawing or a sample before the owner; what was typed survives every refusal. */
export function AskForm({ send, orderNumber, range, stages, items, replaced }: AskFormProps) {
  const [state, submit, isSending] = useActionState(send, fresh);
  const { file, choose, tryAgain } = useSignedFile(orderNumber);
  const refused = refusalIn(state);
  const typed = refused?.values;
  const upload = file?.upload;
  const documentId = upload && 'documentId' in upload ? upload.documentId : '';
  const photoId = upload && 'photoId' in upload ? upload.photoId : '';
  return (
    <form action={submit} className="grid max-w-2xl gap-6">
      <HiddenFields values={{ orderNumber, documentId, photoId, replacesId: replaced?.id ?? '' }} />
      <Segmented
        key={typed?.kind}
        legend="What it is"
        name="kind"
        options={[
          { value: 'drawing', label: 'Drawing' },
          { value: 'sample', label: 'Sample' },
        ]}
        defaultValue={typed?.kind ?? replaced?.kind ?? 'drawing'}
        error={refused?.fields.kind}
        className="max-w-xs"
      />
      <FileField
        file={file}
        error={upload?.step === 'ready' ? undefined : refused?.fields.file}
        onChoose={(chosen) => void choose(chosen)}
        onTryAgain={tryAgain}
      />
      <TextInput
        label="Its name"
        name="title"
        maxLength={200}
        required
        hint="As the owner will know it, such as “Headstock logo, drawing 3”."
        defaultValue={typed?.title}
        error={refused?.fields.title}
      />
      <TextArea
        label="A few words to the owner"
        name="message"
        isOptional
        maxLength={2000}
        defaultValue={typed?.message}
        error={refused?.fields.message}
      />
      <div className="grid gap-6 sm:grid-cols-2">
        <TextInput
          label="Sign by"
          name="dueOn"
          type="date"
          required
          min={range.first}
          max={range.last}
          defaultValue={typed?.dueOn}
          error={refused?.fields.dueOn}
        />
        <Select
          key={`stage ${typed?.blocksStageKey}`}
          label="Stage that waits for it"
          name="blocksStageKey"
          prompt="None"
          options={stages}
          defaultValue={typed?.blocksStageKey ?? replaced?.blocksStageKey ?? undefined}
          error={refused?.fields.blocksStageKey}
        />
      </div>
      {items.length > 0 && (
        <Select
          key={`item ${typed?.itemKey}`}
          label="Item of the spec it belongs to"
          name="itemKey"
          isOptional
          prompt="None of them"
          options={items}
          hint="A new drawing of the same item takes the place of one that still waits."
          defaultValue={typed?.itemKey ?? replaced?.itemKey ?? undefined}
          error={refused?.fields.itemKey}
        />
      )}
      <FormOutcome state={state} shown={shown} />
      <div>
        <Button type="submit" disabled={isSending || (upload !== undefined && isUnderWay(upload.step))}>
          Send it to be signed
        </Button>
      </div>
    </form>
  );
}

const isUnderWay = (step: string) => ['measuring', 'sending', 'checking', 'waiting'].includes(step);
