import type { Metadata } from 'next';
import { reachAgain, retry, sendOnceMore } from './actions';
import { MailCounts } from '@/components/access/mail-counts';
import { MailList } from '@/components/access/mail-list';
import { MailTabs, mailTabs, type MailTab } from '@/components/access/mail-tabs';
import { RefusedReplies } from '@/components/access/refused-replies';
import { TroubledReaders } from '@/components/access/troubled-readers';
import { PageFrame } from '@/components/people/page-frame';
import { LinkButton } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { countMails, listMails, listRefusedReplies, listTroubledReaders, type MailView } from '@/db/queries/mail-watch';
import { orNotFound, pageViewer } from '@/lib/auth/page';
import { requestMs } from '@/lib/request';
import type { Viewer } from '@/lib/viewer';

export const metadata: Metadata = { title: 'Mail' };

const PAGE = 50;

const tabIn = (show: string | string[] | undefined): MailTab => mailTabs.find((tab) => tab === show) ?? 'trouble';

export default async function MailPage({ searchParams }: PageProps<'/access/mail'>) {
  const viewer = await pageViewer();
  const { show, before } = await searchParams;
  const counts = await orNotFound(countMails(viewer));
  const tab = tabIn(show);
  const above = typeof before === 'string' ? before : undefined;
  return (
    <PageFrame
      title="Mail"
      intro="What the shop’s diary sends, and what became of it. A mail that fails is tried again by itself for most of a day; what needs a look after that stands first."
    >
      <MailCounts counts={counts} />
      <MailTabs current={tab} />
      {tab === 'replies' && <Replies viewer={viewer} above={above} />}
      {tab === 'unreachable' && <Readers viewer={viewer} />}
      {tab !== 'replies' && tab !== 'unreachable' && <Mails viewer={viewer} view={tab} above={above} />}
    </PageFrame>
  );
}

async function Mails({ viewer, view, above }: { viewer: Viewer; view: MailView; above?: string }) {
  const mails = await listMails(viewer, view, above);
  const last = mails.at(-1);
  if (!last) return <EmptyState title="No mail here">Nothing stands under this heading.</EmptyState>;
  return (
    <>
      <MailList mails={mails} retry={retry} sendAgain={sendOnceMore} zone={viewer.timeZone} nowMs={requestMs()} />
      {mails.length === PAGE && <Older show={view} before={last.id} />}
    </>
  );
}

async function Replies({ viewer, above }: { viewer: Viewer; above?: string }) {
  const replies = await listRefusedReplies(viewer, above && /^\d{1,15}$/.test(above) ? Number(above) : undefined);
  const last = replies.at(-1);
  if (!last) return <EmptyState title="No reply was turned away">Every answer by mail became a letter.</EmptyState>;
  return (
    <>
      <RefusedReplies replies={replies} zone={viewer.timeZone} nowMs={requestMs()} />
      {replies.length === PAGE && <Older show="replies" before={String(last.receivedAt)} />}
    </>
  );
}

async function Readers({ viewer }: { viewer: Viewer }) {
  const readers = await listTroubledReaders(viewer);
  return <TroubledReaders {...readers} reachAgain={reachAgain} zone={viewer.timeZone} nowMs={requestMs()} />;
}

function Older({ show, before }: { show: string; before: string }) {
  return (
    <div>
      <LinkButton variant="quiet" href={{ query: { show, before } }}>
        Show what came before
      </LinkButton>
    </div>
  );
}
