import type { Metadata } from 'next';
import { change, close, endSessions, reopen } from './actions';
import { takeOff } from '../../actions';
import { AccountTools } from '@/components/access/account-tools';
import { AssignmentTable } from '@/components/access/assignment-table';
import { ChangeForm } from '@/components/access/change-form';
import { PersonFacts } from '@/components/access/person-facts';
import { PlaceList } from '@/components/access/place-list';
import { TakeOff } from '@/components/access/take-off';
import { PageFrame, PageSection } from '@/components/people/page-frame';
import { listAssignmentsOf, listRulesOf, listStandingsOf, requirePersonPage } from '@/db/queries/access-review';
import { listDepartments } from '@/db/queries/departments';
import { isStaffRole } from '@/lib/access';
import { orNotFound, pageViewer } from '@/lib/auth/page';
import { requestMs } from '@/lib/request';

export const metadata: Metadata = { title: 'One person’s access' };

export default async function PersonPage({ params }: PageProps<'/access/people/[userId]'>) {
  const viewer = await pageViewer();
  const { userId } = await params;
  const nowMs = requestMs();
  const person = await orNotFound(requirePersonPage(viewer, userId, nowMs));
  const [assignments, standings, rules, departments] = await Promise.all([
    listAssignmentsOf(viewer, userId),
    listStandingsOf(viewer, userId),
    listRulesOf(viewer, userId),
    listDepartments(),
  ]);
  const isOwn = person.id === viewer.id;
  const when = { zone: viewer.timeZone, nowMs };
  return (
    <PageFrame
      title={<bdi>{person.name}</bdi>}
      intro={<PersonFacts person={person} {...when} />}
      tools={
        <>
          {!isOwn && person.disabledAt === null && (
            <PageSection title="What they are">
              <ChangeForm change={change} person={person} departments={departments} />
            </PageSection>
          )}
          <PageSection title="Their account">
            <AccountTools person={person} tools={{ endSessions, close, reopen }} isOwn={isOwn} {...when} />
          </PageSection>
        </>
      }
    >
      <PageSection title="What they may see">
        {assignments.length > 0 && (
          <AssignmentTable
            assignments={assignments}
            endTool={({ id, orderNumber }) => (
              <TakeOff send={takeOff} assignmentId={id} personName={person.name} orderNumber={orderNumber} />
            )}
            {...when}
          />
        )}
        <PlaceList
          standings={standings}
          rules={rules}
          isStaff={isStaffRole(person.role)}
          isEmpty={assignments.length === 0}
        />
      </PageSection>
    </PageFrame>
  );
}
