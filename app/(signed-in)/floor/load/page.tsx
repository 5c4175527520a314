import type { Metadata } from 'next';
import { FloorNav } from '@/components/floor/floor-nav';
import { PageFrame } from '@/components/people/page-frame';
import { DepartmentLoad, LoadTable } from '@/components/schedule/department-load';
import { listLoads } from '@/db/queries/load';
import { orNotFound, pageViewer } from '@/lib/auth/page';
import { requestMs } from '@/lib/request';

export const metadata: Metadata = { title: 'Load of the departments' };

export default async function LoadPage() {
  const viewer = await pageViewer();
  const loads = await orNotFound(listLoads(viewer, requestMs()));
  const most = Math.max(
    1,
    ...loads.flatMap(({ weeks, capacityPerWeek }) => [capacityPerWeek ?? 0, ...weeks.map(({ arriving }) => arriving)]),
  );
  return (
    <>
      <FloorNav />
      <PageFrame
        title="What comes to each department"
        intro="Builds expected to come in, week by week, reckoned from the same times as the ready windows. The dashed line is what a department can take in a week; a bar over it says so in another colour."
      >
        <div className="grid gap-x-12 gap-y-8 md:grid-cols-2 xl:grid-cols-3">
          {loads.map((load) => (
            <DepartmentLoad key={load.key} load={load} most={most} />
          ))}
        </div>
        <LoadTable loads={loads} />
      </PageFrame>
    </>
  );
}
