'use client';

import { useActionState } from 'react';
import { RoleFields, type Department } from './role-fields';
import { FormOutcome, refusalIn } from '@/components/people/form-outcome';
import { Button } from '@/components/ui/button';
import { TextInput } from '@/components/ui/text-input';
import { roles } from '@/lib/access';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';

export function InviteForm({ invite, departments }: { invite: FormAction; departments: Department[] }) {
  const [state, send, isSending] = useActionState(invite, fresh);
  const refused = refusalIn(state);
  const typed = refused?.values ?? {};
  return (
    <form action={send} className="grid gap-4">
      <TextInput
        label="Name"
        name="name"
        required
        maxLength={200}
        autoComplete="off"
        defaultValue={typed.name}
        error={refused?.fields.name}
      />
      <TextInput
        label="Mail address"
        name="email"
        type="email"
        required
        maxLength={254}
        autoComplete="off"
        defaultValue={typed.email}
        error={refused?.fields.email}
      />
      <RoleFields
        roles={[...roles]}
        departments={departments}
        role={typed.role ?? ''}
        department={typed.department ?? ''}
        fields={refused?.fields}
      />
      <TextInput
        label="Order number"
        name="orderNumber"
        isOptional
        maxLength={20}
        autoComplete="off"
        hint="A buyer or an artist becomes the owner of that build."
        defaultValue={typed.orderNumber}
        error={refused?.fields.orderNumber}
      />
      <FormOutcome state={state} shown={['name', 'email', 'role', 'department', 'orderNumber']} />
      <div>
        <Button type="submit" disabled={isSending}>
          {isSending ? 'Inviting' : 'Invite'}
        </Button>
      </div>
    </form>
  );
}
