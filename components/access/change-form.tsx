'use client';

import { useActionState } from 'react';
import { RoleFields, type Department } from './role-fields';
import { FormOutcome, refusalIn } from '@/components/people/form-outcome';
import { HiddenFields } from '@/components/people/hidden-fields';
import { Button } from '@/components/ui/button';
import { isStaffRole, roles, type Role } from '@/lib/access';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';

type ChangeFormProps = {
  change: FormAction;
  person: { id: string; role: Role; department: string | null };
  departments: Department[];
};

/** Changes what somebody is, within their own side: clients stay clients, the shop stays the shop. */
export function ChangeForm({ change, person, departments }: ChangeFormProps) {
  const [state, send, isSending] = useActionState(change, fresh);
  const refused = refusalIn(state);
  return (
    <form action={send} className="grid gap-4">
      <HiddenFields values={{ userId: person.id }} />
      {!isStaffRole(person.role) && <input type="hidden" name="department" value="" />}
      <RoleFields
        roles={roles.filter((role) => isStaffRole(role) === isStaffRole(person.role))}
        departments={departments}
        role={refused?.values.role ?? person.role}
        department={refused?.values.department ?? person.department ?? ''}
        fields={refused?.fields}
      />
      <FormOutcome state={state} shown={['role', 'department']} />
      <div>
        <Button type="submit" variant="quiet" disabled={isSending}>
          Change
        </Button>
      </div>
    </form>
  );
}
