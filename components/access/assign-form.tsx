'use client';

import { useActionState } from 'react';
import { workWords } from '@/components/people/person-words';
import { FormOutcome, refusalIn } from '@/components/people/form-outcome';
import { Button } from '@/components/ui/button';
import { Checkbox } from '@/components/ui/checkbox';
import { Select } from '@/components/ui/select';
import { TextArea } from '@/components/ui/text-input';
import type { Role } from '@/lib/access';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';

type StaffChoice = { id: string; name: string; role: Role; department: string | null };

type AssignFormProps = {
  assign: FormAction;
  staff: StaffChoice[];
  /** Given where the form is about one build only. */
  orderNumber?: string;
};

/** Puts somebody from the shop on one build or on many. */
export function AssignForm({ assign, staff, orderNumber }: AssignFormProps) {
  const [state, send, isSending] = useActionState(assign, fresh);
  const refused = refusalIn(state);
  const userId = refused?.values.userId ?? '';
  return (
    <form action={send} className="grid gap-4">
      <Select
        key={`who ${userId}`}
        label="Who"
        name="userId"
        required
        prompt="Choose a builder or a rep"
        options={staff.map((person) => ({ value: person.id, label: `${person.name}, ${workWords(person)}` }))}
        defaultValue={userId}
        error={refused?.fields.userId}
      />
      {orderNumber === undefined ? (
        <TextArea
          label="Order numbers"
          name="orderNumbers"
          required
          rows={3}
          maxLength={4000}
          hint="One or many, with a space, a comma or a new line between. If one is unknown, nobody is put on any."
          defaultValue={refused?.values.orderNumbers}
          error={refused?.fields.orderNumbers}
        />
      ) : (
        <input type="hidden" name="orderNumbers" value={orderNumber} />
      )}
      <Checkbox
        label="Cleared for holds"
        name="cleared"
        hint="While a build is held from view, only cleared staff see it. Leave this empty for everybody else: they are shut out until the hold ends."
        defaultChecked={refused?.values.cleared === 'on'}
        error={refused?.fields.cleared}
      />
      <FormOutcome
        state={state}
        shown={orderNumber === undefined ? ['userId', 'orderNumbers', 'cleared'] : ['userId', 'cleared']}
      />
      <div>
        <Button type="submit" disabled={isSending}>
          Assign
        </Button>
      </div>
    </form>
  );
}
