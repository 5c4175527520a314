import { PersonStateWord } from './person-state';
import { workWords } from '@/components/people/person-words';
import type { PersonPage } from '@/db/queries/access-review';
import { dayWords } from '@/lib/date-words';

/** Address, role and since when, in a line. */
export function PersonFacts({ person, zone, nowMs }: { person: PersonPage; zone: string; nowMs: number }) {
  const { email, invitedAt, verifiedAt } = person;
  return (
    <p className="flex flex-wrap gap-x-4 gap-y-1">
      <span className="break-all">{email}</span>
      <span>{workWords(person)}</span>
      <span>
        <PersonStateWord {...person} />
      </span>
      <span>
        invited {dayWords(invitedAt, zone, nowMs)}
        {verifiedAt === null ? ', not come in yet' : `, first came in ${dayWords(verifiedAt, zone, nowMs)}`}
      </span>
    </p>
  );
}
