import type { Metadata } from 'next';
import { FloorNav } from '@/components/floor/floor-nav';
import { PageFrame } from '@/components/people/page-frame';
import { RouteCalibrationSection } from '@/components/schedule/route-calibration';
import { listCalibrations } from '@/db/queries/calibration';
import { orNotFound, pageViewer } from '@/lib/auth/page';
import { requestMs } from '@/lib/request';

export const metadata: Metadata = { title: 'How our windows held' };

export default async function WindowsPage() {
  const viewer = await pageViewer();
  const routes = await orNotFound(listCalibrations(viewer, requestMs()));
  return (
    <>
      <FloorNav />
      <PageFrame
        title="How our windows held"
        intro="Of the windows given when a build came into a stage, how many held the day it was ready. Eight in ten should. Where they clearly did not, new ones are stretched by what was measured, and it is said here."
      >
        <div className="grid gap-x-14 gap-y-10 lg:grid-cols-2">
          {routes.map((route) => (
            <RouteCalibrationSection key={route.routeId} route={route} />
          ))}
        </div>
      </PageFrame>
    </>
  );
}
