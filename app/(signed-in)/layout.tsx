import type { ReactNode } from 'react';
import { TopBar } from '@/components/shell/top-bar';
import { ZoneAsker } from '@/components/mail/zone-asker';
import { findShell } from '@/db/queries/shell';
import { pageViewer } from '@/lib/auth/page';
import { navigationFor } from '@/lib/navigation';

/** Shell and navigation. It guards nothing: every page asks for what it shows. */
export default async function SignedInLayout({ children }: { children: ReactNode }) {
  const viewer = await pageViewer();
  const shell = await findShell(viewer);
  return (
    <>
      <TopBar shopName={shell.shopName} links={navigationFor(viewer.role, shell)} personName={viewer.name} />
      {viewer.timeZoneAskedAt === null && <ZoneAsker />}
      <main id="main" tabIndex={-1} className="outline-none">
        {children}
      </main>
    </>
  );
}
