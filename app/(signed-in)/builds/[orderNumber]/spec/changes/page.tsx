import type { Metadata } from 'next';
import { ask, decline, offer } from './actions';
import { AskChange } from '@/components/specs/ask-change';
import { ChangeList } from '@/components/specs/change-list';
import { SpecFrame } from '@/components/specs/spec-frame';
import { EmptyState } from '@/components/ui/empty-state';
import { SectionHeading } from '@/components/ui/section-heading';
import { shopDay } from '@/db/queries/calendar';
import { listChangeRequests } from '@/db/queries/change-requests';
import { requireFreezeGround } from '@/db/queries/spec-freeze';
import { can } from '@/lib/access';
import { openBuild, orNotFound } from '@/lib/auth/page';
import { requestMs } from '@/lib/request';
import { dueRange } from '@/lib/sign-offs/due-day';
import { freezeOf } from '@/lib/specs/freeze';

export async function generateMetadata({ params }: PageProps<'/builds/[orderNumber]/spec/changes'>): Promise<Metadata> {
  return { title: `Changes to the spec of ${(await params).orderNumber}` };
}

/** Wishes for what is frozen: the owner asks, a rep answers with price and days, the owner signs. */
export default async function ChangesPage({ params, searchParams }: PageProps<'/builds/[orderNumber]/spec/changes'>) {
  const { orderNumber } = await params;
  const { viewer, build } = await openBuild(orderNumber);
  const changes = await orNotFound(listChangeRequests(viewer, orderNumber));
  const [{ agreed, stages }, today] = await Promise.all([
    requireFreezeGround(viewer, orderNumber),
    shopDay(requestMs()),
  ]);
  const nowMs = requestMs();
  const may = (action: Parameters<typeof can>[2]) => can(viewer.role, build.standing, action);
  const frozen = (agreed?.items ?? []).filter((item) => freezeOf(item, stages, nowMs).state === 'frozen');
  const { item } = await searchParams;
  const mayAsk = may('change.ask') && build.deliveredAt === null;
  return (
    <SpecFrame
      orderNumber={orderNumber}
      over={`Order ${orderNumber}`}
      title="Changes to what is frozen"
      intro="Once the stage that makes it has begun, an item changes only by a request: the shop says what it costs and how long it takes, and the owner signs that."
    >
      {changes.length > 0 ? (
        <ChangeList
          changes={changes}
          labels={Object.fromEntries((agreed?.items ?? []).map(({ key, label }) => [key, label]))}
          orderNumber={orderNumber}
          offer={may('change.offer') ? offer : null}
          decline={decline}
          dueRange={dueRange(today)}
          zone={viewer.timeZone}
          nowMs={nowMs}
        />
      ) : (
        <EmptyState title="Nobody has asked for a change">
          {mayAsk ? 'If something on your mind is frozen already, ask for it below.' : 'The owner asks here.'}
        </EmptyState>
      )}
      {mayAsk && frozen.length > 0 && (
        <section aria-labelledby="ask" className="grid max-w-2xl gap-5">
          <SectionHeading id="ask">Ask for a change</SectionHeading>
          <AskChange
            ask={ask}
            orderNumber={orderNumber}
            items={frozen.map(({ key, label }) => ({ value: key, label }))}
            chosen={typeof item === 'string' ? item : ''}
          />
        </section>
      )}
    </SpecFrame>
  );
}
