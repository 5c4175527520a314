import type { Metadata } from 'next';
import { NextPageLink } from '@/components/questions/next-page-link';
import { SignOffList } from '@/components/sign-offs/sign-off-list';
import { LinkButton } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { shopDay } from '@/db/queries/calendar';
import { listSignOffQueue, parseSignOffPlace } from '@/db/queries/sign-offs';
import { isStaffRole } from '@/lib/access';
import { pageViewer } from '@/lib/auth/page';
import { requestMs } from '@/lib/request';

export const metadata: Metadata = { title: 'Sign-offs' };

export default async function SignOffsPage({ searchParams }: PageProps<'/sign-offs'>) {
  const viewer = await pageViewer();
  const nowMs = requestMs();
  const { signOffs, next } = await listSignOffQueue(viewer, parseSignOffPlace((await searchParams).after));
  const title = isStaffRole(viewer.role) ? 'Sign-offs' : 'What waits to be signed';
  return (
    <div className="mx-auto grid max-w-[82rem] gap-6 px-4.5 py-8 md:px-10 md:py-10">
      <h1 className="text-3xl">{title}</h1>
      {signOffs.length === 0 ? (
        <EmptyState title="Nothing waits" action={<LinkButton href="/builds">Go to the builds</LinkButton>}>
          {isStaffRole(viewer.role)
            ? 'What was sent to be signed on your builds stands here until its owner has signed it, the next due first.'
            : 'What you have signed stands with its build. When something new waits for you, you get a mail.'}
        </EmptyState>
      ) : (
        <SignOffList
          caption={title}
          signOffs={signOffs}
          reader={{ zone: viewer.timeZone, nowMs, today: await shopDay(nowMs) }}
          withBuild
        />
      )}
      <NextPageLink path="/sign-offs" next={next} />
    </div>
  );
}
