import { PageSection } from './page-frame';
import { PersonLine } from './person-line';
import { workWords } from './person-words';
import { unreachableWords } from './unreachable-words';
import type { Role } from '@/lib/access';

type Staff = { id: string; name: string; role: Role; department: string | null };
type Client = {
  id: string;
  name: string;
  role: Role;
  standing: 'owner' | 'companion';
  email: string | null;
  unreachableWhy: 'bounced' | 'complained' | null;
};

type BuildPeopleProps = { staff: Staff[]; clients: Client[]; viewerId: string };

/** The two sides of a build. Addresses stand only where the query gave them. */
export function BuildPeople({ staff, clients, viewerId }: BuildPeopleProps) {
  return (
    <div className="grid content-start gap-10">
      <PageSection title="From the shop">
        {staff.length === 0 && <p className="text-soft">Nobody is assigned yet. The shop’s admin does that.</p>}
        <ul role="list" className="-mt-4">
          {staff.map((person) => (
            <PersonLine key={person.id} name={person.name} note={workWords(person)} />
          ))}
        </ul>
      </PageSection>
      {clients.length > 0 && (
        <PageSection title="The player’s side">
          <ul role="list" className="-mt-4">
            {clients.map((person) => (
              <PersonLine
                key={person.id}
                name={person.name}
                note={
                  <>
                    {person.standing === 'owner' ? `owner, ${person.role}` : 'companion, looks on'}
                    {person.email && person.id !== viewerId && <span className="block break-all">{person.email}</span>}
                    {person.unreachableWhy && (
                      <span className="block font-semibold text-late">{unreachableWords[person.unreachableWhy]}</span>
                    )}
                  </>
                }
              />
            ))}
          </ul>
        </PageSection>
      )}
    </div>
  );
}
