import type { Role } from '@/lib/access';

/** What somebody is to the reader of a letter: their department at the shop, or their part in the build. */
export function partWords({ role, department }: { role: Role; department: string | null }): string {
  return role === 'builder' ? (department ?? 'builder') : role;
}

/** A name as one says it to somebody: its first word. */
export const firstName = (name: string) => name.trim().split(/\s+/)[0] ?? name;
