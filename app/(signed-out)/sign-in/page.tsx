import type { Metadata } from 'next';
import { redirect } from 'next/navigation';
import { ask } from './actions';
import { AskForm } from '@/components/sign-in/ask-form';
import { DemoPeople } from '@/components/sign-in/demo-people';
import { SignedOutPage } from '@/components/shell/signed-out-page';
import { listDemoPeople } from '@/db/queries/demo-people';
import { findShop } from '@/db/queries/shop';
import { findViewer } from '@/lib/auth/viewer';
import { env } from '@/lib/env';

export const metadata: Metadata = { title: 'Sign in' };

export default async function SignInPage({ searchParams }: PageProps<'/sign-in'>) {
  if (await findViewer()) redirect('/');
  const { address } = await searchParams;
  const shop = await findShop();
  const mailRoomUrl = env().DEMO_MAIL_ROOM_URL;
  return (
    <SignedOutPage shopName={shop.name} title="Sign in to your build diary">
      <AskForm ask={ask} address={typeof address === 'string' ? address : ''} />
      {mailRoomUrl && <DemoPeople ask={ask} people={await listDemoPeople()} mailRoomUrl={mailRoomUrl} />}
    </SignedOutPage>
  );
}
