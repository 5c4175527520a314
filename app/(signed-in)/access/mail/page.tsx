import type { Metadata } from 'next';
import { retry } from './actions';
import { MailCounts } from '@/components/access/mail-counts';
import { MailList } from '@/components/access/mail-list';
import { PageFrame } from '@/components/people/page-frame';
import { EmptyState } from '@/components/ui/empty-state';
import { listMailProblems } from '@/db/queries/outbox';
import { orNotFound, pageViewer } from '@/lib/auth/page';
import { requestMs } from '@/lib/request';

export const metadata: Metadata = { title: 'Mail' };

export default async function MailPage() {
  const viewer = await pageViewer();
  const { counts, troubled } = await orNotFound(listMailProblems(viewer));
  return (
    <PageFrame
      title="Mail"
      intro="What the shop’s diary sends. A mail that fails is tried again by itself for most of a day; what stands below after that needs a look."
    >
      <MailCounts counts={counts} />
      {troubled.length > 0 ? (
        <MailList mails={troubled} retry={retry} zone={viewer.timeZone} nowMs={requestMs()} />
      ) : (
        <EmptyState title="No mail is in trouble">Whatever fails, or waits for another try, is listed here.</EmptyState>
      )}
    </PageFrame>
  );
}
