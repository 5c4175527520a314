import type { Role } from '@/lib/access';

type Link = { href: string; label: string; count?: number };

const builds = { href: '/builds', label: 'Builds' };
const bench = { href: '/bench', label: 'Bench' };
const access = { href: '/access', label: 'Access' };

/** The pages that a role comes here for, most used first. */
export function navigationFor(role: Role, waiting: number): Link[] {
  const questions = { href: '/questions', label: 'Questions', count: waiting > 0 ? waiting : undefined };
  if (role === 'builder') return [bench, builds, questions];
  if (role === 'rep') return [builds, questions, bench];
  if (role === 'admin') return [access, builds];
  return [{ ...builds, label: 'Your builds' }, questions];
}

/** Where somebody lands after signing in. */
export function homeOf(role: Role): string {
  if (role === 'builder') return '/bench';
  if (role === 'admin') return '/access';
  return '/builds';
}
