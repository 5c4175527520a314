import type { Metadata } from 'next';
import { BuildList } from '@/components/builds/build-list';
import { FinishStyles } from '@/components/builds/finish-style';
import { UndecidedList } from '@/components/checks/undecided-checks';
import { LinkButton } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { listBuilds } from '@/db/queries/builds';
import { listUndecidedChecks } from '@/db/queries/checks';
import { isClientRole } from '@/lib/access';
import { pageViewer } from '@/lib/auth/page';
import { pageNonce, requestMs } from '@/lib/request';

export const metadata: Metadata = { title: 'Builds' };

export default async function BuildsPage({ searchParams }: PageProps<'/builds'>) {
  const viewer = await pageViewer();
  const { before } = await searchParams;
  const [builds, undecided] = await Promise.all([
    listBuilds(viewer, typeof before === 'string' ? before : undefined),
    listUndecidedChecks(viewer),
  ]);
  const isClient = isClientRole(viewer.role);
  const last = builds.at(-1);
  return (
    <div className="mx-auto grid max-w-[82rem] gap-6 px-4.5 py-8 md:px-10 md:py-10">
      <FinishStyles finishHexes={builds.map(({ finishHex }) => finishHex)} nonce={await pageNonce()} />
      <h1 className="text-3xl">{isClient ? 'Your builds' : 'Your builds on the floor'}</h1>
      <UndecidedList runs={undecided} zone={viewer.timeZone} nowMs={requestMs()} />
      {builds.length === 0 ? (
        <NoBuilds isClient={isClient} isAdmin={viewer.role === 'admin'} />
      ) : (
        <BuildList builds={builds} zone={viewer.timeZone} nowMs={requestMs()} />
      )}
      {builds.length === 40 && last && (
        <div>
          <LinkButton variant="quiet" href={`/builds?before=${last.orderNumber}`}>
            Show older orders
          </LinkButton>
        </div>
      )}
    </div>
  );
}

function NoBuilds({ isClient, isAdmin }: { isClient: boolean; isAdmin: boolean }) {
  if (isClient)
    return (
      <EmptyState title="No build is open to you">
        If you have ordered one, ask the shop to put your address on it.
      </EmptyState>
    );
  if (isAdmin) {
    return (
      <EmptyState title="You are on no build" action={<LinkButton href="/access">Go to access</LinkButton>}>
        An admin sees that builds exist. To read one, step in from the access page, with a reason its owner can read.
      </EmptyState>
    );
  }
  return (
    <EmptyState title="You are on no build yet">
      The admin assigns builds. They appear here and at your bench.
    </EmptyState>
  );
}
