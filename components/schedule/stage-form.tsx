'use client';

import { useActionState } from 'react';
import { FormOutcome, refusalIn } from '@/components/people/form-outcome';
import { HiddenFields } from '@/components/people/hidden-fields';
import { Button } from '@/components/ui/button';
import { TextInput } from '@/components/ui/text-input';
import type { StageSetting } from '@/db/queries/shop-calendar';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';

const fields = [
  { name: 'bestDays', label: 'At best' },
  { name: 'likelyDays', label: 'Most likely' },
  { name: 'worstDays', label: 'At worst' },
  { name: 'minimumWaitDays', label: 'Shortest wait' },
  { name: 'silenceDays', label: 'Longest silence' },
] as const;

/** How the shop itself expects one stage to go; estimates in working days, waits and silences in calendar days. */
export function StageForm({ save, stage }: { save: FormAction; stage: StageSetting }) {
  const [state, send, isSending] = useActionState(save, fresh);
  const refused = refusalIn(state);
  return (
    <form action={send} aria-label={stage.name} className="grid gap-2 border-t border-line pt-3">
      <HiddenFields values={{ routeId: stage.routeId, stageKey: stage.key }} />
      <h3 className="text-lg">{stage.name}</h3>
      <div className="grid grid-cols-2 items-end gap-3 sm:grid-cols-3 xl:grid-cols-6">
        {fields.map(({ name, label }) => (
          <TextInput
            key={name}
            id={`${stage.routeId}-${stage.key}-${name}`}
            label={label}
            name={name}
            inputMode="numeric"
            defaultValue={refused?.values[name] ?? stage[name] ?? ''}
            error={refused?.fields[name]}
          />
        ))}
        <Button
          type="submit"
          variant="quiet"
          disabled={isSending}
          aria-label={`Save ${stage.name}`}
          className="min-h-11"
        >
          Save
        </Button>
      </div>
      <FormOutcome state={state} shown={fields.map(({ name }) => name)} />
    </form>
  );
}
