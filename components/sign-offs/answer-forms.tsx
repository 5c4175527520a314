'use client';

import { useActionState } from 'react';
import { FormOutcome, refusalIn } from '@/components/people/form-outcome';
import { HiddenFields } from '@/components/people/hidden-fields';
import { Button } from '@/components/ui/button';
import { TextArea, TextInput } from '@/components/ui/text-input';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';

type AnswerProps = { signOffId: string; title: string; personName: string; sign: FormAction; askForChange: FormAction };

/** The owner's two answers: their name under it, or words on what should be different. */
export function AnswerForms({ signOffId, title, personName, sign, askForChange }: AnswerProps) {
  return (
    <div className="grid gap-x-14 gap-y-10 md:grid-cols-2">
      <SignForm signOffId={signOffId} title={title} personName={personName} sign={sign} />
      <ChangeForm signOffId={signOffId} askForChange={askForChange} />
    </div>
  );
}

function SignForm({ signOffId, title, personName, sign }: Omit<AnswerProps, 'askForChange'>) {
  const [state, submit, isSending] = useActionState(sign, fresh);
  const refused = refusalIn(state);
  return (
    <section aria-labelledby="sign" className="grid content-start gap-4 border-t-2 border-ink pt-4">
      <h2 id="sign" className="text-xl">
        Sign it
      </h2>
      <p>
        With your name you agree to “<bdi>{title}</bdi>” just as it is shown here.
      </p>
      <form action={submit} className="grid gap-4">
        <HiddenFields values={{ signOffId }} />
        <TextInput
          label="Type your name"
          name="name"
          autoComplete="name"
          maxLength={400}
          hint={
            <>
              As on your account: <bdi>{personName}</bdi>
            </>
          }
          defaultValue={refused?.values.name}
          error={refused?.fields.name}
          className="max-w-md"
          controlSize="bench"
        />
        <FormOutcome state={state} shown={['name']} />
        <div>
          <Button type="submit" size="bench" disabled={isSending}>
            Sign
          </Button>
        </div>
      </form>
    </section>
  );
}

function ChangeForm({ signOffId, askForChange }: Pick<AnswerProps, 'signOffId' | 'askForChange'>) {
  const [state, submit, isSending] = useActionState(askForChange, fresh);
  const refused = refusalIn(state);
  return (
    <section aria-labelledby="change" className="grid content-start gap-4 border-t-2 border-line pt-4">
      <h2 id="change" className="text-xl">
        Or ask for a change
      </h2>
      <p>Nothing is signed then. The shop changes it and sends it to you again.</p>
      <form action={submit} className="grid gap-4">
        <HiddenFields values={{ signOffId }} />
        <TextArea
          label="What should be different?"
          name="words"
          maxLength={2000}
          defaultValue={refused?.values.words}
          error={refused?.fields.words}
        />
        <FormOutcome state={state} shown={['words']} />
        <div>
          <Button type="submit" variant="quiet" size="bench" disabled={isSending}>
            Ask for this change
          </Button>
        </div>
      </form>
    </section>
  );
}
