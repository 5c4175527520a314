import type { Metadata } from 'next';
import { PageFrame } from '@/components/people/page-frame';
import { BoardMovements } from '@/components/readings/board-movements';
import { LumberLot } from '@/components/readings/lumber-lot';
import { ReadingPlots } from '@/components/readings/reading-plots';
import { ReadingTable } from '@/components/readings/reading-table';
import { EmptyState } from '@/components/ui/empty-state';
import { listStages } from '@/db/queries/builds';
import { listBoards, listReadings } from '@/db/queries/readings';
import { can } from '@/lib/access';
import { openBuild, orNotFound } from '@/lib/auth/page';
import { seriesOf } from '@/lib/readings/series';
import { requestMs } from '@/lib/request';
import type { Viewer } from '@/lib/viewer';

export async function generateMetadata({ params }: PageProps<'/builds/[orderNumber]/readings'>): Promise<Metadata> {
  return { title: `Readings of ${(await params).orderNumber}` };
}

export default async function ReadingsPage({ params }: PageProps<'/builds/[orderNumber]/readings'>) {
  const { orderNumber } = await params;
  const { viewer, build } = await openBuild(orderNumber);
  const readings = await orNotFound(listReadings(viewer, orderNumber));
  const series = seriesOf(readings);
  const boards = can(viewer.role, build.standing, 'spec.read') ? await listBoards(viewer, orderNumber) : [];
  const isAtWood = can(viewer.role, build.standing, 'entry.post') && (await isInWoodRoom(viewer, build.id));
  const when = { zone: viewer.timeZone, nowMs: requestMs() };
  return (
    <PageFrame over={<span className="narrow">Order {orderNumber}</span>} title="Readings over time">
      {readings.length === 0 ? (
        <EmptyState title="Nothing has been measured yet">
          The bench takes readings with its entries. They stand in the diary, and over time they are drawn here.
        </EmptyState>
      ) : (
        <div className="grid gap-12">
          <ReadingPlots series={series} {...when} />
          <BoardMovements boards={boards} moisture={series.moisture} {...when} />
          <ReadingTable readings={readings} orderNumber={orderNumber} {...when} />
        </div>
      )}
      {isAtWood && <LumberLot />}
    </PageFrame>
  );
}

/** Whether wood is what is worked on now: lots are counted while it comes in. */
async function isInWoodRoom(viewer: Viewer, buildId: string): Promise<boolean> {
  const stages = await listStages(viewer, buildId);
  return stages.some(({ work, startedAt, finishedAt }) => work === 'wood' && startedAt !== null && finishedAt === null);
}
