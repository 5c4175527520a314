import type { ReactNode } from 'react';
import { notFound } from 'next/navigation';
import { SubNav } from '@/components/shell/sub-nav';
import { can } from '@/lib/access';
import { pageViewer } from '@/lib/auth/page';

const links = [
  { href: '/access', label: 'People' },
  { href: '/access/builds', label: 'Builds' },
  { href: '/access/checks', label: 'Inspection lists' },
  { href: '/access/calendar', label: 'Calendar' },
  { href: '/access/stages', label: 'Stages' },
  { href: '/access/topics', label: 'Topics' },
  { href: '/access/mail', label: 'Mail' },
  { href: '/access/record', label: 'Record' },
];

/** The way between the access pages. What each shows is guarded by its own queries. */
export default async function AccessLayout({ children }: { children: ReactNode }) {
  const viewer = await pageViewer();
  if (!can(viewer.role, 'none', 'people.manage')) notFound();
  return (
    <>
      <SubNav label="Access" links={links} />
      {children}
    </>
  );
}
