'use client';

import { useActionState } from 'react';
import { FormOutcome, refusalIn } from '@/components/people/form-outcome';
import { HiddenFields } from '@/components/people/hidden-fields';
import { Button } from '@/components/ui/button';
import { Checkbox } from '@/components/ui/checkbox';
import { Select, type Option } from '@/components/ui/select';
import { TextInput } from '@/components/ui/text-input';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';

type NewListProps = { add: FormAction; routeId: string; stages: Option[] };

/** A new inspection list for one stage of a route. */
export function NewListForm({ add, routeId, stages }: NewListProps) {
  const [state, send, isSending] = useActionState(add, fresh);
  const refused = refusalIn(state);
  return (
    <form action={send} className="grid max-w-md gap-4">
      <HiddenFields values={{ routeId }} />
      <TextInput
        label="Name of a new list"
        name="name"
        required
        maxLength={80}
        hint="Such as Before paint."
        defaultValue={refused?.values.name}
        error={refused?.fields.name}
      />
      <Select
        label="Gone through in"
        name="stageKey"
        required
        prompt="Choose a stage"
        options={stages}
        defaultValue={refused?.values.stageKey}
        error={refused?.fields.stageKey}
      />
      <FormOutcome state={state} shown={['name', 'stageKey']} />
      <div>
        <Button type="submit" variant="quiet" disabled={isSending}>
          Add the list
        </Button>
      </div>
    </form>
  );
}

type LineFormProps = {
  save: FormAction;
  /** Which list it is added to, or which line it rewords. */
  values: Record<string, string>;
  label: string;
  button: string;
  line?: { text: string; photoNeeded: boolean };
};

/** Writes a line of a list, or rewords one. */
export function LineForm({ save, values, label, button, line }: LineFormProps) {
  const [state, send, isSending] = useActionState(save, fresh);
  const refused = refusalIn(state);
  return (
    <form action={send} className="grid max-w-xl gap-3">
      <HiddenFields values={values} />
      <TextInput
        label={label}
        name="text"
        required
        maxLength={200}
        defaultValue={refused?.values.text ?? line?.text}
        error={refused?.fields.text}
      />
      <Checkbox
        label="Ask for a photo"
        name="photoNeeded"
        defaultChecked={refused ? refused.values.photoNeeded === 'on' : line?.photoNeeded}
      />
      <FormOutcome state={state} shown={['text']} />
      <div>
        <Button type="submit" variant="quiet" disabled={isSending}>
          {button}
        </Button>
      </div>
    </form>
  );
}
