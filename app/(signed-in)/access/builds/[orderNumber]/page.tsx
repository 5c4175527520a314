import type { Metadata } from 'next';
import { stepIn } from './actions';
import { assign, takeOff } from '../../actions';
import { AssignForm } from '@/components/access/assign-form';
import { ReviewLists } from '@/components/access/review-lists';
import { StepInForm } from '@/components/access/step-in-form';
import { TakeOff } from '@/components/access/take-off';
import { PageFrame, PageSection } from '@/components/people/page-frame';
import { LinkButton } from '@/components/ui/button';
import { reviewBuild } from '@/db/queries/access-review';
import { listStaffPeople } from '@/db/queries/assignments';
import { orNotFound, pageViewer } from '@/lib/auth/page';
import { requestMs } from '@/lib/request';

export async function generateMetadata({ params }: PageProps<'/access/builds/[orderNumber]'>): Promise<Metadata> {
  return { title: `Access to ${(await params).orderNumber}` };
}

export default async function BuildReviewPage({ params }: PageProps<'/access/builds/[orderNumber]'>) {
  const viewer = await pageViewer();
  const { orderNumber } = await params;
  const review = await orNotFound(reviewBuild(viewer, orderNumber));
  const staff = await listStaffPeople(viewer);
  const isOn = review.staff.some(({ userId }) => userId === viewer.id);
  return (
    <PageFrame
      title={`Who may see ${orderNumber}`}
      intro={
        !review.isOpen && <span className="font-semibold text-brass-deep">Held from view: cleared staff only</span>
      }
      tools={
        <>
          <PageSection title="Assign staff">
            <AssignForm assign={assign} staff={staff} orderNumber={orderNumber} />
          </PageSection>
          <PageSection title="Step in">
            {isOn ? (
              <LinkButton href={`/builds/${orderNumber}`} className="justify-self-start">
                Open the diary
              </LinkButton>
            ) : (
              <StepInForm stepIn={stepIn} orderNumber={orderNumber} />
            )}
          </PageSection>
        </>
      }
    >
      <ReviewLists
        review={review}
        endTool={({ id, name }) => (
          <TakeOff send={takeOff} assignmentId={id} personName={name} orderNumber={orderNumber} />
        )}
        zone={viewer.timeZone}
        nowMs={requestMs()}
      />
    </PageFrame>
  );
}
