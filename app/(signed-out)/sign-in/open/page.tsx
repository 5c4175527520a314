import type { Metadata } from 'next';
import { OpenButton } from '@/components/sign-in/open-button';
import { SignedOutPage } from '@/components/shell/signed-out-page';
import { findShop } from '@/db/queries/shop';

export const metadata: Metadata = { title: 'Sign in' };

/** Where a mailed link leads. Opening it changes nothing: mail scanners open links too. */
export default async function OpenPage() {
  const shop = await findShop();
  return (
    <SignedOutPage shopName={shop.name} title="One press and you are in">
      <p className="text-lg">The link from your mail works once. Press the button to sign in with this browser.</p>
      <OpenButton />
      <noscript>
        <p>This button needs scripts. Without them, type the code from the mail on the page where you asked for it.</p>
      </noscript>
    </SignedOutPage>
  );
}
