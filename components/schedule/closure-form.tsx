'use client';

import { useActionState } from 'react';
import { FormOutcome, refusalIn } from '@/components/people/form-outcome';
import { Button } from '@/components/ui/button';
import { TextInput } from '@/components/ui/text-input';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';

/** Adds days on which the shop is closed, or closes early. They may overlap others. */
export function ClosureForm({ add }: { add: FormAction }) {
  const [state, send, isSending] = useActionState(add, fresh);
  const refused = refusalIn(state);
  const field = (name: string) => ({ name, defaultValue: refused?.values[name] ?? '', error: refused?.fields[name] });
  return (
    <form action={send} className="grid gap-3">
      <TextInput label="What it is" {...field('name')} />
      <div className="grid gap-3 sm:grid-cols-2">
        <TextInput label="First day" type="date" {...field('startsOn')} />
        <TextInput label="Last day" type="date" isOptional {...field('endsOn')} />
      </div>
      <TextInput label="Half a day: work ends at" type="time" isOptional {...field('closesAt')} />
      <FormOutcome state={state} shown={['name', 'startsOn', 'endsOn', 'closesAt']} />
      <div>
        <Button type="submit" disabled={isSending}>
          Put it in the calendar
        </Button>
      </div>
    </form>
  );
}
