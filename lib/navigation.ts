import type { Role } from '@/lib/access';

type Link = { href: string; label: string; count?: number };

const builds = { href: '/builds', label: 'Builds' };
const bench = { href: '/bench', label: 'Bench' };
const floor = { href: '/floor', label: 'Floor' };
const access = { href: '/access', label: 'Access' };

/** The pages that a role comes here for, most used first, with how much waits there for this person. */
export function navigationFor(role: Role, waiting: { questions: number; signOffs: number }): Link[] {
  const signOffs = { href: '/sign-offs', label: 'Sign-offs', count: waiting.signOffs || undefined };
  const questions = { href: '/questions', label: 'Questions', count: waiting.questions || undefined };
  if (role === 'builder') return [bench, floor, builds, questions];
  if (role === 'rep') return [builds, floor, questions, signOffs, bench];
  if (role === 'admin') return [access, floor, builds];
  return [{ ...builds, label: 'Your builds' }, questions, signOffs];
}

/** Where somebody lands after signing in. */
export function homeOf(role: Role): string {
  if (role === 'builder') return '/bench';
  if (role === 'admin') return '/access';
  return '/builds';
}
