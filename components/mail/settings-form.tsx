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

const quietHours = [{ value: '', label: 'None' }, ...hours];

type Plan = MailPlan & { quietFromHour?: number | null; quietToHour?: number | null };
type MailSettingsFormProps = {
  save: FormAction;
  plan: Plan;
  side: 'client' | 'shop';
  zone: string;
  zones: ZoneGroup[];
};

const shown = ['cadence', 'hourLocal', 'weekday', 'quietFromHour', 'quietToHour', 'zone'];

/** When a digest comes by mail, and when nothing may. Hour and day stay in sight whatever is chosen; their hints say when they count. */
export function MailSettingsForm({ save, plan, side, zone, zones }: MailSettingsFormProps) {
  const [state, send, isSending] = useActionState(save, fresh);
  const refused = refusalIn(state);
  const hour = refused?.values.hourLocal ?? String(plan.hourLocal);
  const weekday = refused?.values.weekday ?? String(plan.weekday);
  const quietFrom = refused?.values.quietFromHour ?? String(plan.quietFromHour ?? '');
  const quietTo = refused?.values.quietToHour ?? String(plan.quietToHour ?? '');
  return (
    <form action={send} className="grid max-w-xl gap-6">
      <CadenceChoice side={side} chosen={refused?.values.cadence ?? plan.cadence} error={refused?.fields.cadence} />
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
      <div className="grid gap-6 sm:grid-cols-2">
        <Select
          key={`from ${quietFrom}`}
          label="Quiet from"
          name="quietFromHour"
          hint="From then on nothing but sign-in links is mailed."
          options={quietHours}
          defaultValue={quietFrom}
          error={refused?.fields.quietFromHour}
        />
        <Select
          key={`to ${quietTo}`}
          label="Quiet until"
          name="quietToHour"
          hint="What waited comes then."
          options={quietHours}
          defaultValue={quietTo}
          error={refused?.fields.quietToHour}
        />
      </div>
      <ZoneSelect zones={zones} chosen={refused?.values.zone ?? zone} error={refused?.fields.zone} />
      <FormOutcome state={state} shown={shown} />
      <div>
        <Button type="submit" disabled={isSending}>
          Save
        </Button>
      </div>
    </form>
  );
}
