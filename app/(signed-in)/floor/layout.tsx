import { notFound } from 'next/navigation';
import type { ReactNode } from 'react';
import { AccessNav } from '@/components/access/access-nav';
import { can } from '@/lib/access';
import { pageViewer } from '@/lib/auth/page';

const links = [
  { href: '/floor', label: 'Floor' },
  { href: '/floor/load', label: 'Load' },
  { href: '/floor/windows', label: 'Windows' },
];

/** The way between the pages of the floor. What each shows is guarded by its own queries. */
export default async function FloorLayout({ children }: { children: ReactNode }) {
  const viewer = await pageViewer();
  if (!can(viewer.role, 'none', 'floor.read')) notFound();
  return (
    <>
      <AccessNav label="Floor" links={links} />
      {children}
    </>
  );
}
