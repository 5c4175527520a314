import type { Metadata } from 'next';
import { finish } from '../actions';
import { RunForm } from '@/components/checks/run-form';
import { RunRecord } from '@/components/checks/run-record';
import { Notice } from '@/components/ui/notice';
import { listStages } from '@/db/queries/builds';
import { requireCheckRun } from '@/db/queries/checks';
import { openBuild, orNotFound } from '@/lib/auth/page';
import { requestMs } from '@/lib/request';

export async function generateMetadata({
  params,
}: PageProps<'/builds/[orderNumber]/checks/[runId]'>): Promise<Metadata> {
  return { title: `Check of ${(await params).orderNumber}` };
}

export default async function CheckRunPage({ params }: PageProps<'/builds/[orderNumber]/checks/[runId]'>) {
  const { orderNumber, runId } = await params;
  const { viewer, build } = await openBuild(orderNumber);
  const run = await orNotFound(requireCheckRun(viewer, orderNumber, runId));
  const stages = await listStages(viewer, build.id);
  const here = stages.find(({ id }) => id === run.stageId)?.position ?? 0;
  const earlier = stages.filter(({ position }) => position < here).reverse();
  return (
    <div className="mx-auto grid max-w-2xl gap-5 px-4.5 py-8">
      <div>
        <p className="narrow text-sm font-semibold text-soft">
          Order {orderNumber} · {run.stageName}
        </p>
        <h1 className="mt-1 text-3xl">{run.listName}</h1>
      </div>
      {run.outcome === null ? (
        <RunForm
          run={run}
          orderNumber={orderNumber}
          stages={earlier.map(({ id, name }) => ({ value: id, label: name }))}
          finish={finish}
        />
      ) : (
        <>
          <Notice
            tone={run.outcome === 'failed' ? 'late' : 'done'}
            title={run.outcome === 'failed' ? 'Failed' : 'Passed'}
          >
            {run.outcome === 'failed' && (
              <p>
                It went back to {run.backToStageName}: {run.reason}
              </p>
            )}
          </Notice>
          <RunRecord run={run} zone={viewer.timeZone} nowMs={requestMs()} />
        </>
      )}
    </div>
  );
}
