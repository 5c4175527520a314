import type { Role } from '@/lib/access';

/** What a role is called in a list to choose from, with what it is for. */
export const roleLabels: Record<Role, string> = {
  buyer: 'Buyer: has ordered an instrument',
  artist: 'Artist: a signed player',
  builder: 'Builder: works a department',
  rep: 'Rep: artist relations and customer care',
  admin: 'Admin: manages who sees what',
};

/** "finish" for a builder of that department, otherwise the role: what stands small under a name. */
export const workWords = ({ role, department }: { role: Role; department: string | null }) =>
  role === 'builder' && department ? department : role;

/** "every build on the bass route", "every build while it is in Finish". */
export function ruleWords({ routeName, stageName }: { routeName: string | null; stageName: string | null }): string {
  const which = routeName ? `every build on the ${routeName} route` : 'every build';
  return stageName ? `${which} while it is in ${stageName}` : which;
}
