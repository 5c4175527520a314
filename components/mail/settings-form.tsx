'use client';

import { useActionState } from 'react';
import { CadenceChoice } from './settings-cadence';
import { ZoneSelect } from './settings-zone';
import { FormOutcome, refusalIn } from '@/components/people/form-outcome';
import { Button } from '@/components/ui/button';
import { Select } from '@/components/ui/select';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';
import { hourWords, weekdays, type MailPlan } from '@/lib/mail/plan-words';
import type { ZoneGroup } from '@/lib/zones';

const hours = Array.from({ length: 24 }, (_, hour) => ({ value: String(hour), label: hourWords(hour) }));
const days = weekdays.map((label, index) => ({ value: String(index + 1), label }));

type MailSettingsFormProps = { save: FormAction; plan: MailPlan; zone: string; zones: ZoneGroup[] };

/** When the diary comes by mail. Hour and day stay in sight whatever is chosen; their hints say when they count. */
export function MailSettingsForm({ save, plan, zone, zones }: MailSettingsFormProps) {
  const [state, send, isSending] = useActionState(save, fresh);
  const refused = refusalIn(state);
  const hour = refused?.values.hourLocal ?? String(plan.hourLocal);
  const weekday = refused?.values.weekday ?? String(plan.weekday);
  return (
    <form action={send} className="grid max-w-xl gap-6">
      <CadenceChoice chosen={refused?.values.cadence ?? plan.cadence} error={refused?.fields.cadence} />
      <div className="grid gap-6 sm:grid-cols-2">
        <Select
          key={`hour ${hour}`}
          label="Hour"
          name="hourLocal"
          hint="Counts for every day and every week."
          options={hours}
          defaultValue={hour}
          error={refused?.fields.hourLocal}
        />
        <Select
          key={`day ${weekday}`}
          label="Day"
          name="weekday"
          hint="Counts for every week only."
          options={days}
          defaultValue={weekday}
          error={refused?.fields.weekday}
        />
      </div>
      <ZoneSelect zones={zones} chosen={refused?.values.zone ?? zone} error={refused?.fields.zone} />
      <FormOutcome state={state} shown={['cadence', 'hourLocal', 'weekday', 'zone']} />
      <div>
        <Button type="submit" disabled={isSending}>
          Save
        </Button>
      </div>
    </form>
  );
}

/** The part of it that staff have. */
export function ZoneForm({ save, zone, zones }: Omit<MailSettingsFormProps, 'plan'>) {
  const [state, send, isSending] = useActionState(save, fresh);
  const refused = refusalIn(state);
  return (
    <form action={send} className="grid max-w-xl gap-6">
      <ZoneSelect zones={zones} chosen={refused?.values.zone ?? zone} error={refused?.fields.zone} />
      <FormOutcome state={state} shown={['zone']} />
      <div>
        <Button type="submit" disabled={isSending}>
          Save
        </Button>
      </div>
    </form>
  );
}
