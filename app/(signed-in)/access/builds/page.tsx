import type { Metadata } from 'next';
import { assign } from '../actions';
import { AssignForm } from '@/components/access/assign-form';
import { BuildsTable } from '@/components/access/builds-table';
import { PageFrame, PageSection } from '@/components/people/page-frame';
import { LinkButton } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { listBuildsByNumber } from '@/db/queries/builds';
import { listStaffPeople } from '@/db/queries/assignments';
import { orNotFound, pageViewer } from '@/lib/auth/page';

export const metadata: Metadata = { title: 'Who is on which build' };

const PAGE = 40;

export default async function AccessBuildsPage({ searchParams }: PageProps<'/access/builds'>) {
  const viewer = await pageViewer();
  const { after } = await searchParams;
  const [builds, staff] = await Promise.all([
    orNotFound(listBuildsByNumber(viewer, typeof after === 'string' ? after : '')),
    orNotFound(listStaffPeople(viewer)),
  ]);
  const last = builds.at(-1);
  return (
    <PageFrame
      title="Who is on which build"
      intro="Every build in the shop that is not delivered yet, by number. What they are is for the people on them; the number leads to who those are, and to stepping in."
      tools={
        <PageSection id="assign" title="Assign staff">
          <AssignForm assign={assign} staff={staff} />
        </PageSection>
      }
    >
      <LinkButton href="#assign" variant="quiet" className="justify-self-start lg:hidden">
        Assign staff
      </LinkButton>
      {builds.length > 0 ? (
        <BuildsTable builds={builds} />
      ) : (
        <EmptyState title="No build to show">
          {after ? 'The list ends above.' : 'Once orders are entered, their numbers stand here.'}
        </EmptyState>
      )}
      {builds.length === PAGE && last && (
        <div>
          <LinkButton variant="quiet" href={{ query: { after: last.orderNumber } }}>
            Show the next {PAGE}
          </LinkButton>
        </div>
      )}
    </PageFrame>
  );
}
