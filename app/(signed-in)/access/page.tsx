import type { Metadata } from 'next';
import { invite } from './actions';
import { InviteForm } from '@/components/access/invite-form';
import { PeopleTable } from '@/components/access/people-table';
import { SearchForm } from '@/components/access/search-form';
import { PageFrame, PageSection } from '@/components/people/page-frame';
import { LinkButton } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { listDepartments } from '@/db/queries/departments';
import { listPeople } from '@/db/queries/people';
import { orNotFound, pageViewer } from '@/lib/auth/page';

export const metadata: Metadata = { title: 'People' };

const PAGE = 50;

export default async function PeoplePage({ searchParams }: PageProps<'/access'>) {
  const viewer = await pageViewer();
  const { search: asked, after } = await searchParams;
  const search = typeof asked === 'string' ? asked.trim().slice(0, 100) : '';
  const afterId = typeof after === 'string' ? after : undefined;
  const [people, departments] = await Promise.all([orNotFound(listPeople(viewer, search, afterId)), listDepartments()]);
  const last = people.at(-1);
  return (
    <PageFrame
      title="People"
      intro="Everybody with an account or an invitation. A name leads to what that person may see."
      tools={
        <PageSection id="invite" title="Invite somebody">
          <InviteForm invite={invite} departments={departments} />
        </PageSection>
      }
    >
      <div className="flex flex-wrap items-end justify-between gap-4">
        <SearchForm search={search} />
        <LinkButton href="#invite" variant="quiet" className="min-h-11 lg:hidden">
          Invite somebody
        </LinkButton>
      </div>
      {people.length > 0 ? <PeopleTable people={people} /> : <Nobody search={search} />}
      {people.length === PAGE && last && (
        <div>
          <LinkButton variant="quiet" href={{ query: { ...(search && { search }), after: last.id } }}>
            Show the next {PAGE}
          </LinkButton>
        </div>
      )}
    </PageFrame>
  );
}

function Nobody({ search }: { search: string }) {
  return (
    <EmptyState title={search ? 'Nobody by that name or address' : 'Nobody further down'}>
      {search ? 'Try a shorter part of it, or invite them.' : 'The list ends above.'}
    </EmptyState>
  );
}
