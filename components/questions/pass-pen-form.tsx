'use client';

import { useActionState, useState } from 'react';
import { FormOutcome, refusalIn } from '@/components/people/form-outcome';
import { HiddenFields } from '@/components/people/hidden-fields';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Select } from '@/components/ui/select';
import { TextInput } from '@/components/ui/text-input';
import type { PenTaker } from '@/db/queries/pen';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';
import { partWords } from '@/lib/questions/people-words';

type PassPenFormProps = { pass: FormAction; questionId: string; takers: PenTaker[] };

/** Gives the pen to somebody else on the build, with a reason that the shop reads. */
export function PassPenForm({ pass, questionId, takers }: PassPenFormProps) {
  const [isOpen, setIsOpen] = useState(false);
  const [state, send, isSending] = useActionState(async (...sent: Parameters<FormAction>) => {
    const next = await pass(...sent);
    if (next.state === 'done') setIsOpen(false);
    return next;
  }, fresh);
  const refused = refusalIn(state);
  return (
    <>
      <Button variant="quiet" onClick={() => setIsOpen(true)} className="min-h-11">
        Pass the pen
      </Button>
      <Dialog
        isOpen={isOpen}
        onClose={() => setIsOpen(false)}
        title="Pass the pen"
        description="Whoever gets it answers from then on. They are told by mail, and the shop reads your reason."
      >
        <form action={send} className="grid gap-4">
          <HiddenFields values={{ questionId }} />
          <Select
            key={refused?.values.toId ?? ''}
            label="To"
            name="toId"
            required
            prompt="Choose who answers"
            options={takers.map((taker) => ({ value: taker.id, label: takerWords(taker) }))}
            defaultValue={refused?.values.toId}
            error={refused?.fields.toId}
          />
          <TextInput
            label="Why"
            name="reason"
            required
            maxLength={300}
            autoComplete="off"
            defaultValue={refused?.values.reason}
            error={refused?.fields.reason}
          />
          <FormOutcome state={state} shown={['toId', 'reason']} />
          <div className="flex justify-end">
            <Button type="submit" disabled={isSending} className="min-h-11">
              Pass it
            </Button>
          </div>
        </form>
      </Dialog>
    </>
  );
}

const takerWords = (taker: PenTaker) => `${taker.name}, ${partWords(taker)}${taker.isAway ? ' (out of office)' : ''}`;
