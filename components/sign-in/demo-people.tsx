'use client';

import { useActionState } from 'react';
import { SectionHeading } from '@/components/ui/section-heading';
import { fresh, type FormState } from '@/lib/form-state';

type Person = { name: string; email: string; role: string; does: string };
type Ask = (previous: FormState, form: FormData) => Promise<FormState>;

const groups = [
  ['Players', ['buyer', 'artist']],
  ['At the bench', ['builder']],
  ['Reps and admin', ['rep', 'admin']],
] as const;

/** The people of the demo world, a button each. Their mail lies in the local mail room. */
export function DemoPeople({ ask, people, mailRoomUrl }: { ask: Ask; people: Person[]; mailRoomUrl: string }) {
  const [, send, isSending] = useActionState(ask, fresh);
  return (
    <section className="grid gap-5">
      <SectionHeading>The demo world</SectionHeading>
      <p className="text-soft">
        Choose whom to be. The link goes to that person’s mail, which lies in the{' '}
        <a href={mailRoomUrl} target="_blank" rel="noopener" className="text-finish-deep underline underline-offset-2">
          mail room
        </a>{' '}
        on this machine.
      </p>
      <form action={send} className="grid gap-6 sm:grid-cols-2 lg:grid-cols-3">
        {groups.map(([title, roles]) => (
          <fieldset key={title} disabled={isSending} className="grid content-start gap-2">
            <legend className="heading mb-2">{title}</legend>
            {people
              .filter((person) => roles.some((role) => role === person.role))
              .slice(0, 9)
              .map((person) => (
                <PersonButton key={person.email} person={person} />
              ))}
          </fieldset>
        ))}
      </form>
    </section>
  );
}

function PersonButton({ person }: { person: Person }) {
  return (
    <button
      type="submit"
      name="address"
      value={person.email}
      className="min-h-12 rounded-[5px] border border-line bg-sheet px-3 py-2 text-left hover:bg-tint"
    >
      <span className="block font-semibold">{person.name}</span>
      <span className="block text-sm text-soft">{person.does}</span>
    </button>
  );
}
