import type { Metadata } from 'next';
import Link from 'next/link';
import { CodeForm } from '@/components/sign-in/code-form';
import { SignedOutPage } from '@/components/shell/signed-out-page';
import { Notice } from '@/components/ui/notice';
import { findShop } from '@/db/queries/shop';
import { env } from '@/lib/env';

export const metadata: Metadata = { title: 'Look at your mail' };

export default async function SentPage() {
  const shop = await findShop();
  const mailRoomUrl = env().DEMO_MAIL_ROOM_URL;
  return (
    <SignedOutPage shopName={shop.name} title="Look at your mail">
      <p className="text-lg">
        If {shop.name} has invited this address, a link is on its way. It works once, for ten minutes, and in this
        browser.
      </p>
      {mailRoomUrl && (
        <Notice title="This is the demo">
          <a
            href={mailRoomUrl}
            target="_blank"
            rel="noopener"
            className="text-finish-deep underline underline-offset-2"
          >
            Open the mail room
          </a>{' '}
          and take the newest mail.
        </Notice>
      )}
      <CodeForm />
      <p className="text-soft">
        Nothing came? Look among the unwanted mail, or{' '}
        <Link href="/sign-in" className="text-finish-deep underline underline-offset-2">
          ask again
        </Link>
        .
      </p>
    </SignedOutPage>
  );
}
