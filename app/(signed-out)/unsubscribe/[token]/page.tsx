import type { Metadata } from 'next';
import { stopDiaryMail } from './actions';
import { StopForm } from '@/components/mail/stop-form';
import { SignedOutPage } from '@/components/shell/signed-out-page';
import { findShop } from '@/db/queries/shop';

export const metadata: Metadata = { title: 'Diary mail' };

/** Reached from the foot of a digest. It signs nobody in and says nobody’s name. */
export default async function UnsubscribePage({ params }: PageProps<'/unsubscribe/[token]'>) {
  const { token } = await params;
  const shop = await findShop();
  return (
    <SignedOutPage shopName={shop.name} title="Stop the diary mails?">
      <p className="text-lg">
        The diary itself stays open to you, and answers to your own questions still come by mail. You can turn the mails
        on again under your settings.
      </p>
      <StopForm stop={stopDiaryMail} token={token} />
    </SignedOutPage>
  );
}
