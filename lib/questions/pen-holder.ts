import type { Role } from '@/lib/access';

type Topic = { answeredBy: 'department' | 'rep'; department: string | null };
type Candidate = { id: string; role: Role; department: string | null };

/**
 * Who must answer: the builder of the topic's department on this build, else a rep on it, else nobody. `staff` comes in
 * the order in which they were put on the build, and the first who fits holds the pen.
 */
export function penHolder(topic: Topic, staff: readonly Candidate[]): string | null {
  const builder = staff.find((person) => person.role === 'builder' && person.department === topic.department);
  const rep = staff.find((person) => person.role === 'rep');
  return (topic.answeredBy === 'department' ? (builder ?? rep) : rep)?.id ?? null;
}
