import type { Metadata } from 'next';
import { DigestPreview } from '@/components/mail/digest-preview';
import { PageFrame } from '@/components/people/page-frame';
import { LinkButton } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { pageViewer } from '@/lib/auth/page';
import { previewDigest } from '@/lib/jobs/preview-digest';
import { requestMs } from '@/lib/request';

export const metadata: Metadata = { title: 'Your next digest' };

/** What the viewer's digest would say if it went out now. Looking at it sends nothing and moves nothing. */
export default async function DigestPreviewPage() {
  const viewer = await pageViewer();
  const preview = await previewDigest(viewer, requestMs());
  return (
    <PageFrame title="Your next digest" intro="As it would be if it went out this minute. Looking at it sends nothing.">
      {preview ? (
        <DigestPreview {...preview} />
      ) : (
        <EmptyState title="Nothing to tell">
          There is nothing new since your last digest, or you have chosen to get none.
        </EmptyState>
      )}
      <div>
        <LinkButton href="/me" variant="quiet">
          Back to your settings
        </LinkButton>
      </div>
    </PageFrame>
  );
}
