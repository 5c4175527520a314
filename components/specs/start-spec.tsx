'use client';

import { useActionState } from 'react';
import { FormOutcome, refusalIn } from '@/components/people/form-outcome';
import { HiddenFields } from '@/components/people/hidden-fields';
import { Button } from '@/components/ui/button';
import { Select } from '@/components/ui/select';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';

type StartSpecProps = { orderNumber: string; templates: { id: string; name: string }[]; start: FormAction };

export function StartSpec({ orderNumber, templates, start }: StartSpecProps) {
  const [state, send, isSending] = useActionState(start, fresh);
  const refused = refusalIn(state);
  return (
    <form action={send} className="grid max-w-md gap-4">
      <HiddenFields values={{ orderNumber }} />
      <Select
        label="Start from"
        name="templateId"
        prompt="Choose a template"
        options={templates.map(({ id, name }) => ({ value: id, label: name }))}
        defaultValue={refused?.values.templateId}
        error={refused?.fields.templateId}
      />
      <FormOutcome state={state} shown={['templateId']} />
      <div>
        <Button type="submit" disabled={isSending}>
          Start the spec
        </Button>
      </div>
    </form>
  );
}
