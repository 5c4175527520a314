import type { Metadata } from 'next';
import { FloorNav } from '@/components/floor/floor-nav';
import { PrintButton } from '@/components/floor/print-button';
import { RackList } from '@/components/floor/rack-list';
import { LinkButton } from '@/components/ui/button';
import { listRack } from '@/db/queries/floor';
import { orNotFound, pageViewer } from '@/lib/auth/page';
import { dayWords } from '@/lib/date-words';
import { requestMs } from '@/lib/request';

/** Next leaves what an address has encoded as it is. */
async function rackOf(params: Promise<{ rack: string }>): Promise<string> {
  const { rack } = await params;
  try {
    return decodeURIComponent(rack);
  } catch {
    return rack;
  }
}

export async function generateMetadata({ params }: PageProps<'/floor/racks/[rack]'>): Promise<Metadata> {
  return { title: (await rackOf(params)).slice(0, 60) };
}

export default async function RackPage({ params }: PageProps<'/floor/racks/[rack]'>) {
  const viewer = await pageViewer();
  const [rack, nowMs] = [await rackOf(params), requestMs()];
  const { rows, routes, others } = await orNotFound(listRack(viewer, rack, nowMs));
  const count = rows.length === 1 ? 'One build' : `${rows.length} builds`;
  return (
    <>
      <FloorNav />
      <div className="mx-auto grid max-w-[60rem] grid-cols-[minmax(0,1fr)] gap-5 px-4.5 py-8 md:px-10 print:max-w-none print:p-0">
        <div className="flex flex-wrap items-end justify-between gap-4">
          <div>
            <h1 className="text-3xl first-letter:uppercase">{rack}</h1>
            <p className="mt-1 text-soft">
              {count}, {dayWords(nowMs, viewer.timeZone, nowMs)}
            </p>
          </div>
          <div className="flex flex-wrap gap-3 print:hidden">
            <LinkButton variant="quiet" className="min-h-11" href={`/floor?rack=${encodeURIComponent(rack)}`}>
              Move them on the floor
            </LinkButton>
            <PrintButton />
          </div>
        </div>
        <RackList rows={rows} routes={routes} others={others} />
      </div>
    </>
  );
}
