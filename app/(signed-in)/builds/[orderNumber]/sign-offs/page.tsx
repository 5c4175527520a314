import type { Metadata } from 'next';
import { PageFrame } from '@/components/people/page-frame';
import { SignOffList } from '@/components/sign-offs/sign-off-list';
import { LinkButton } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { shopDay } from '@/db/queries/calendar';
import { listBuildSignOffs } from '@/db/queries/sign-offs';
import { can } from '@/lib/access';
import { openBuild, orNotFound } from '@/lib/auth/page';
import { requestMs } from '@/lib/request';

type Props = PageProps<'/builds/[orderNumber]/sign-offs'>;

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  return { title: `Sign-offs of ${(await params).orderNumber}` };
}

export default async function BuildSignOffsPage({ params }: Props) {
  const { orderNumber } = await params;
  const { viewer, build } = await openBuild(orderNumber);
  const nowMs = requestMs();
  const signOffs = await orNotFound(listBuildSignOffs(viewer, orderNumber));
  const mayAsk = can(viewer.role, build.standing, 'sign_off.ask');
  const ask = <LinkButton href={`/builds/${orderNumber}/sign-offs/new`}>Send something to be signed</LinkButton>;
  return (
    <PageFrame
      over={<span className="narrow">{build.orderNumber}</span>}
      title="Sign-offs"
      intro="What the owner agrees to before it is made, and what they said."
    >
      {signOffs.length === 0 ? (
        <EmptyState title="Nothing was sent to be signed yet" action={mayAsk ? ask : undefined}>
          {mayAsk
            ? 'Send a drawing or a sample, and the owner gets a mail. Versions of the spec are sent from the spec.'
            : 'When the shop needs your word on a drawing, a sample or the spec, it stands here and you get a mail.'}
        </EmptyState>
      ) : (
        <div className="grid gap-6">
          {mayAsk && <div>{ask}</div>}
          <SignOffList
            caption={`Sign-offs of ${build.orderNumber}`}
            signOffs={signOffs}
            reader={{ zone: viewer.timeZone, nowMs, today: await shopDay(nowMs) }}
          />
        </div>
      )}
    </PageFrame>
  );
}
