import { roleLabels } from '@/components/people/person-words';
import { Select } from '@/components/ui/select';
import type { Role } from '@/lib/access';

export type Department = { key: string; name: string };

type RoleFieldsProps = {
  roles: Role[];
  departments: Department[];
  role: string;
  department: string;
  fields?: Record<string, string>;
};

/** What somebody is, and where a builder works. Keyed by their values: a sent form goes back to how its fields were made. */
export function RoleFields({ roles, departments, role, department, fields = {} }: RoleFieldsProps) {
  return (
    <>
      <Select
        key={`role ${role}`}
        label="Role"
        name="role"
        options={roles.map((value) => ({ value, label: roleLabels[value] }))}
        prompt={role === '' ? 'Choose one' : undefined}
        defaultValue={role}
        error={fields.role}
      />
      {roles.includes('builder') && (
        <Select
          key={`department ${department}`}
          label="Department"
          name="department"
          hint="Of a builder; for anybody else it is left out."
          options={departments.map(({ key, name }) => ({ value: key, label: name }))}
          prompt="None"
          defaultValue={department}
          error={fields.department}
        />
      )}
    </>
  );
}
