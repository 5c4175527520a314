'use client';

import { useActionState } from 'react';
import { FormOutcome, refusalIn } from '@/components/people/form-outcome';
import { Button } from '@/components/ui/button';
import { FieldError, fieldAria, controlClass, controlSizes } from '@/components/ui/field';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';
import { weekdays } from '@/lib/mail/plan-words';
import { stretches, type Hours } from '@/lib/schedule/week-form';

const two = (value: number) => String(value).padStart(2, '0');
const clock = (minutes: number | undefined) =>
  minutes === undefined ? '' : `${two(Math.floor(minutes / 60))}:${two(minutes % 60)}`;

const spoken = [
  { opens: 'work begins', closes: 'work ends, or the break begins' },
  { opens: 'the break ends', closes: 'work ends after the break' },
];

const rowClass =
  'grid max-w-3xl grid-cols-[minmax(0,1fr)_minmax(0,1fr)] items-center gap-x-3 gap-y-1.5 lg:grid-cols-[6.5rem_repeat(4,minmax(0,1fr))]';

/** When work begins and ends on each day of the week, twice where there is a break; a day without times is a day off. */
export function HoursForm({ save, hours }: { save: FormAction; hours: readonly Hours[] }) {
  const [state, send, isSending] = useActionState(save, fresh);
  const refused = refusalIn(state);
  const days = weekdays.map((name, index) => ({ name, day: index + 1 }));
  return (
    <form action={send} className="grid gap-4 lg:gap-3">
      <p className="text-soft">Fill in the second pair of times where there is a break, such as at noon.</p>
      {days.map(({ name, day }) => (
        <Day
          key={name}
          name={name}
          day={day}
          hours={hours.filter(({ weekday }) => weekday === day)}
          refused={refused}
        />
      ))}
      <FormOutcome state={state} shown={days.flatMap(({ day }) => stretches.map(({ opens }) => `${opens}${day}`))} />
      <div>
        <Button type="submit" disabled={isSending}>
          Save the week
        </Button>
      </div>
    </form>
  );
}

type DayProps = { name: string; day: number; hours: readonly Hours[]; refused: ReturnType<typeof refusalIn> };

function Day({ name, day, hours, refused }: DayProps) {
  const input = (field: string, minutes: number | undefined, label: string) => ({
    ...fieldAria(`${field}${day}`, { error: refused?.fields[`${field}${day}`] }),
    name: `${field}${day}`,
    type: 'time',
    defaultValue: refused?.values[`${field}${day}`] ?? clock(minutes),
    'aria-label': `${name}, ${label}`,
    className: `${controlClass} ${controlSizes.normal}`,
  });
  return (
    <fieldset className="grid gap-1">
      <legend className="sr-only">{name}</legend>
      <div className={rowClass}>
        <span aria-hidden="true" className="max-lg:col-span-2">
          {name}
        </span>
        {stretches.flatMap(({ opens, closes }, index) => [
          <input key={opens} {...input(opens, hours[index]?.opensAtMin, spoken[index]?.opens ?? '')} />,
          <input key={closes} {...input(closes, hours[index]?.closesAtMin, spoken[index]?.closes ?? '')} />,
        ])}
      </div>
      {stretches.map(({ opens }) => (
        <FieldError key={opens} id={`${opens}${day}`} error={refused?.fields[`${opens}${day}`]} />
      ))}
    </fieldset>
  );
}
