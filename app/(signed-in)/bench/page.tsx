import type { Metadata } from 'next';
import { notFound, redirect } from 'next/navigation';
import { BenchBuilds } from '@/components/bench/bench-builds';
import { FindBuild } from '@/components/bench/find-build';
import { WaitingDrafts } from '@/components/bench/waiting-drafts';
import { FinishStyles } from '@/components/builds/finish-style';
import { LinkButton } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { listBuilds } from '@/db/queries/builds';
import { isStaffRole } from '@/lib/access';
import { pageViewer } from '@/lib/auth/page';
import { pageNonce } from '@/lib/request';
import type { Viewer } from '@/lib/viewer';

export const metadata: Metadata = { title: 'Bench' };

export default async function BenchPage({ searchParams }: PageProps<'/bench'>) {
  const viewer = await pageViewer();
  if (!isStaffRole(viewer.role)) notFound();
  const { find, before } = await searchParams;
  const wanted = typeof find === 'string' ? orderPrefix(find) : '';
  const builds = wanted ? await findBuilds(viewer, wanted) : await listBuilds(viewer, textOf(before));
  const [only] = builds;
  if (wanted && builds.length === 1 && only?.orderNumber === wanted) redirect(`/bench/${only.orderNumber}`);
  const onFloor = wanted ? builds : builds.filter(({ deliveredAt }) => deliveredAt === null);
  const last = builds.at(-1);
  return (
    <div className="mx-auto grid max-w-[82rem] gap-6 px-4.5 py-8 md:px-10">
      <FinishStyles finishHexes={onFloor.map(({ finishHex }) => finishHex)} nonce={await pageNonce()} />
      <h1 className="text-3xl">Your bench</h1>
      <WaitingDrafts viewerId={viewer.id} />
      <FindBuild
        found={wanted}
        error={
          wanted && builds.length === 0 ? 'No build of yours has this number. Look at the rack tag again.' : undefined
        }
      />
      {onFloor.length > 0 && <BenchBuilds builds={onFloor} />}
      {onFloor.length === 0 && !wanted && (
        <EmptyState title="Nothing is on your bench yet">
          The admin assigns builds. They appear here as soon as you are on one.
        </EmptyState>
      )}
      {wanted && (
        <div>
          <LinkButton variant="quiet" size="bench" href="/bench">
            Show all
          </LinkButton>
        </div>
      )}
      {!wanted && builds.length === 40 && last && (
        <div>
          <LinkButton variant="quiet" size="bench" href={`/bench?before=${last.orderNumber}`}>
            Show older orders
          </LinkButton>
        </div>
      )}
    </div>
  );
}

const textOf = (value: string | string[] | undefined) => (typeof value === 'string' ? value : undefined);

/** "2417" and "q-2417" both mean Q-2417. */
function orderPrefix(typed: string): string {
  const mark = typed.trim().toUpperCase().slice(0, 20);
  return /^\d+$/.test(mark) ? `Q-${mark}` : mark;
}

/** Order numbers that begin so lie side by side, below the last of them. */
async function findBuilds(viewer: Viewer, prefix: string) {
  const near = await listBuilds(viewer, `${prefix}\uffff`);
  return near.filter(({ orderNumber }) => orderNumber.startsWith(prefix));
}
