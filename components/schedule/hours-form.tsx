'use client';

import { useActionState } from 'react';
import { FormOutcome, refusalIn } from '@/components/people/form-outcome';
import { Button } from '@/components/ui/button';
import { FieldError, fieldAria, controlClass, controlSizes } from '@/components/ui/field';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';
import { weekdays } from '@/lib/mail/plan-words';

type Hours = { weekday: number; opensAtMin: number; closesAtMin: number };

const two = (value: number) => String(value).padStart(2, '0');
const clock = (minutes: number | undefined) =>
  minutes === undefined ? '' : `${two(Math.floor(minutes / 60))}:${two(minutes % 60)}`;

/** When work begins and ends on each day of the week; a day without times is a day off. */
export function HoursForm({ save, hours }: { save: FormAction; hours: readonly Hours[] }) {
  const [state, send, isSending] = useActionState(save, fresh);
  const refused = refusalIn(state);
  return (
    <form action={send} className="grid gap-3">
      {weekdays.map((name, index) => {
        const day = hours.find(({ weekday }) => weekday === index + 1);
        const field = (part: 'opens' | 'closes', minutes: number | undefined) => ({
          ...fieldAria(`${part}${index + 1}`, {
            error: part === 'opens' ? refused?.fields[`opens${index + 1}`] : undefined,
          }),
          name: `${part}${index + 1}`,
          type: 'time',
          defaultValue: refused?.values[`${part}${index + 1}`] ?? clock(minutes),
          'aria-label': `${name}, work ${part === 'opens' ? 'begins' : 'ends'}`,
          className: `${controlClass} ${controlSizes.normal}`,
        });
        return (
          <div key={name} className="grid gap-1">
            <div className="grid max-w-md grid-cols-[6.5rem_minmax(0,1fr)_minmax(0,1fr)] items-center gap-3">
              <span>{name}</span>
              <input {...field('opens', day?.opensAtMin)} />
              <input {...field('closes', day?.closesAtMin)} />
            </div>
            <FieldError id={`opens${index + 1}`} error={refused?.fields[`opens${index + 1}`]} />
          </div>
        );
      })}
      <FormOutcome state={state} shown={weekdays.map((_, index) => `opens${index + 1}`)} />
      <div>
        <Button type="submit" disabled={isSending}>
          Save the week
        </Button>
      </div>
    </form>
  );
}
