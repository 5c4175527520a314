import type { Metadata } from 'next';
import { ChainCheck } from '@/components/access/chain-check';
import { EventList } from '@/components/people/event-list';
import { PageFrame } from '@/components/people/page-frame';
import { LinkButton } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { checkRecord, listAuditEvents } from '@/db/queries/audit';
import { orNotFound, pageViewer } from '@/lib/auth/page';
import { requestMs } from '@/lib/request';

export const metadata: Metadata = { title: 'Record' };

const PAGE = 50;

/** A position in the record from the page's address; anything else means its newest end. */
function positionIn(before: string | string[] | undefined): number {
  return typeof before === 'string' && /^\d{1,15}$/.test(before) ? Number(before) : Number.MAX_SAFE_INTEGER;
}

export default async function RecordPage({ searchParams }: PageProps<'/access/record'>) {
  const viewer = await pageViewer();
  const { before, check } = await searchParams;
  const events = await orNotFound(listAuditEvents(viewer, positionIn(before)));
  const last = events.at(-1);
  return (
    <PageFrame
      title="Record"
      intro="Who was let in where, and who was turned away, newest first. Nothing in it can be changed or taken out; each line carries a seal made from the one before."
    >
      {check === '1' ? (
        <ChainCheck brokenSeq={await checkRecord(viewer)} />
      ) : (
        <LinkButton href="/access/record?check=1" prefetch={false} variant="quiet" className="justify-self-start">
          Check every seal
        </LinkButton>
      )}
      {events.length > 0 ? (
        <div className="border-t-2 border-ink">
          <EventList events={events} zone={viewer.timeZone} nowMs={requestMs()} />
        </div>
      ) : (
        <EmptyState title="Nothing further back">The record begins above.</EmptyState>
      )}
      {events.length === PAGE && last && (
        <div>
          <LinkButton variant="quiet" href={{ query: { before: last.seq } }}>
            Show what came before
          </LinkButton>
        </div>
      )}
    </PageFrame>
  );
}
