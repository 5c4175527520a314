'use client';

import { useActionState } from 'react';
import { FormOutcome, refusalIn } from '@/components/people/form-outcome';
import { Button } from '@/components/ui/button';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';
import { mailRules, type MailChoice } from '@/lib/mail/choices';
import type { MailKind } from '@/lib/mail/kinds';

const ways: { value: MailChoice; label: string }[] = [
  { value: 'at_once', label: 'At once' },
  { value: 'digest', label: 'In the digest' },
  { value: 'never', label: 'Never' },
];

type Choice = { kind: MailKind; choice: MailChoice };
type ChoicesFormProps = { save: FormAction; choices: Choice[] };

/** How each kind of mail comes: by itself, in the next digest, or not at all. */
export function ChoicesForm({ save, choices }: ChoicesFormProps) {
  const [state, send, isSending] = useActionState(save, fresh);
  const refused = refusalIn(state);
  return (
    <form action={send} className="grid max-w-xl grid-cols-[minmax(0,1fr)] gap-6">
      <p className="text-soft">Sign-in links, invitations and what you are asked to sign always come at once.</p>
      <div className="border-t border-line">
        {choices.map(({ kind, choice }) => (
          <ChoiceRow key={kind} kind={kind} chosen={refused?.values[kind] ?? choice} />
        ))}
      </div>
      <FormOutcome state={state} />
      <div>
        <Button type="submit" disabled={isSending}>
          Save
        </Button>
      </div>
    </form>
  );
}

function ChoiceRow({ kind, chosen }: { kind: MailKind; chosen: string }) {
  const { words } = mailRules[kind];
  return (
    <fieldset className="min-w-0 border-b border-line py-2.5">
      <legend className="float-left w-full font-semibold">{words.charAt(0).toUpperCase() + words.slice(1)}</legend>
      <div className="clear-both flex flex-wrap gap-x-6">
        {ways.map(({ value, label }) => (
          <label key={value} className="flex min-h-11 items-center gap-2">
            <input
              type="radio"
              name={kind}
              value={value}
              defaultChecked={value === chosen}
              className="size-5 shrink-0 accent-finish-deep"
            />
            {label}
          </label>
        ))}
      </div>
    </fieldset>
  );
}
