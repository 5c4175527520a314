import type { ReactNode } from 'react';
import { TopBar } from '@/components/shell/top-bar';
import { ZoneAsker } from '@/components/mail/zone-asker';
import { countWaiting } from '@/db/queries/questions';
import { countWaitingSignOffs } from '@/db/queries/sign-offs';
import { findShop } from '@/db/queries/mail-content';
import { pageViewer } from '@/lib/auth/page';
import { navigationFor } from '@/lib/navigation';

/** Shell and navigation. It guards nothing: every page asks for what it shows. */
export default async function SignedInLayout({ children }: { children: ReactNode }) {
  const viewer = await pageViewer();
  const [shop, waiting, toSign] = await Promise.all([findShop(), countWaiting(viewer), countWaitingSignOffs(viewer)]);
  return (
    <>
      <TopBar shopName={shop.name} links={navigationFor(viewer.role, waiting, toSign)} personName={viewer.name} />
      {viewer.timeZoneAskedAt === null && <ZoneAsker />}
      <main id="main" tabIndex={-1} className="outline-none">
        {children}
      </main>
    </>
  );
}
