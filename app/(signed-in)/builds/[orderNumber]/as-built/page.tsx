import type { Metadata } from 'next';
import { AsBuiltView } from '@/components/as-built/as-built-view';
import { DownloadSheet } from '@/components/as-built/download-sheet';
import { PageFrame } from '@/components/people/page-frame';
import { EmptyState } from '@/components/ui/empty-state';
import { readAsBuilt } from '@/db/queries/as-built';
import { asBuiltSheet } from '@/lib/as-built/sheet';
import { orNotFound, pageViewer } from '@/lib/auth/page';
import { requestMs } from '@/lib/request';

export async function generateMetadata({ params }: PageProps<'/builds/[orderNumber]/as-built'>): Promise<Metadata> {
  return { title: `${(await params).orderNumber} as signed, as built` };
}

export default async function AsBuiltPage({ params }: PageProps<'/builds/[orderNumber]/as-built'>) {
  const viewer = await pageViewer();
  const { orderNumber } = await params;
  const facts = await orNotFound(readAsBuilt(viewer, orderNumber));
  if (!facts)
    return (
      <PageFrame over={<span className="narrow">Order {orderNumber}</span>} title="As signed, as built">
        <EmptyState title="No version of the spec is signed yet">
          Once its owner has signed one, every item of it stands here beside what was measured and the entry that shows
          it.
        </EmptyState>
      </PageFrame>
    );
  return (
    <AsBuiltView
      sheet={asBuiltSheet(facts, viewer.timeZone, requestMs())}
      download={
        <DownloadSheet
          href={`/api/builds/${facts.orderNumber}/as-built/pdf`}
          fileName={`${facts.orderNumber}-as-built.pdf`}
        />
      }
    />
  );
}
