import type { Metadata } from 'next';
import { start } from './actions';
import { CheckLists, FinishedRuns } from '@/components/checks/check-lists';
import { PageFrame, PageSection } from '@/components/people/page-frame';
import { LinkButton } from '@/components/ui/button';
import { listChecks } from '@/db/queries/checks';
import { orNotFound, pageViewer } from '@/lib/auth/page';
import { requestMs } from '@/lib/request';

export async function generateMetadata({ params }: PageProps<'/builds/[orderNumber]/checks'>): Promise<Metadata> {
  return { title: `Checks of ${(await params).orderNumber}` };
}

export default async function ChecksPage({ params }: PageProps<'/builds/[orderNumber]/checks'>) {
  const viewer = await pageViewer();
  const { orderNumber } = await params;
  const checks = await orNotFound(listChecks(viewer, orderNumber));
  const finished = checks.runs.filter(({ outcome }) => outcome !== null);
  return (
    <PageFrame
      over={<span className="narrow">Order {orderNumber}</span>}
      title="Checks"
      intro="Lists that are gone through before paint and before the case closes. A build leaves their stage when they are passed."
    >
      <PageSection title="Inspection lists">
        <CheckLists checks={checks} orderNumber={orderNumber} start={start} />
      </PageSection>
      <PageSection title="Final check">
        <p className="text-soft">Every signed item beside its proof, before the case closes.</p>
        <div>
          <LinkButton variant="quiet" size="bench" href={`/builds/${orderNumber}/final-check`}>
            Open the final check
          </LinkButton>
        </div>
      </PageSection>
      {finished.length > 0 && (
        <PageSection title="Gone through before">
          <FinishedRuns runs={finished} orderNumber={orderNumber} zone={viewer.timeZone} nowMs={requestMs()} />
        </PageSection>
      )}
    </PageFrame>
  );
}
