'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Select } from '@/components/ui/select';
import { TextArea } from '@/components/ui/text-input';
import type { NamedStage } from '@/lib/floor/row';

type TakeBackFormProps = {
  /** The stages that lie behind. */
  stages: readonly NamedStage[];
  isSending: boolean;
  onSend: (toStageKey: string, reason: string) => void;
};

/** Takes a build back to an earlier stage; the owner reads where it went, the reason stays in the shop. */
export function TakeBackForm({ stages, isSending, onSend }: TakeBackFormProps) {
  const [stage, setStage] = useState(stages.at(-1)?.key ?? '');
  const [reason, setReason] = useState('');
  const [error, setError] = useState('');
  if (stages.length === 0) return null;
  const submit = () => {
    if (reason.trim() === '') return setError('Say why it goes back, so that the next hands know.');
    onSend(stage, reason);
  };
  return (
    <details className="border-t border-line pt-2">
      <summary className="inline-flex min-h-11 items-center font-semibold text-finish-deep">Take it back</summary>
      <div className="grid gap-3 pt-2">
        <Select
          label="To which stage"
          value={stage}
          onChange={({ target }) => setStage(target.value)}
          options={stages.map(({ key, name }) => ({ value: key, label: name }))}
        />
        <TextArea
          label="Why"
          hint="For the next hands. The owner sees where it went, not this."
          rows={2}
          value={reason}
          error={error}
          onChange={({ target }) => setReason(target.value)}
        />
        <div>
          <Button variant="quiet" disabled={isSending} onClick={submit}>
            Take it back
          </Button>
        </div>
      </div>
    </details>
  );
}
