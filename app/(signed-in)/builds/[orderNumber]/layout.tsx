import type { ReactNode } from 'react';
import { FinishStyle } from '@/components/builds/finish-style';
import { UnreachableNotice } from '@/components/people/unreachable-notice';
import { SubNav } from '@/components/shell/sub-nav';
import { listUnreachableOwners } from '@/db/queries/contacts';
import { can, isClientRole } from '@/lib/access';
import { openBuild } from '@/lib/auth/page';
import { pageNonce } from '@/lib/request';

/** Every page of a build wears its finish and carries the way to the others. It guards nothing by itself. */
export default async function BuildLayout({ children, params }: LayoutProps<'/builds/[orderNumber]'>) {
  const { viewer, build } = await openBuild((await params).orderNumber);
  const path = `/builds/${build.orderNumber}`;
  const unreachable = can(viewer.role, build.standing, 'contacts.read')
    ? await listUnreachableOwners(viewer, build.orderNumber)
    : [];
  const links = [
    { href: path, label: 'Diary' },
    ...(can(viewer.role, build.standing, 'spec.read') ? [{ href: `${path}/spec`, label: 'Spec' }] : []),
    ...(can(viewer.role, build.standing, 'question.read') ? [{ href: `${path}/questions`, label: 'Questions' }] : []),
    ...(can(viewer.role, build.standing, 'sign_off.read') ? [{ href: `${path}/sign-offs`, label: 'Sign-offs' }] : []),
    ...(can(viewer.role, build.standing, 'spec.read') ? [{ href: `${path}/as-built`, label: 'As built' }] : []),
    ...(can(viewer.role, build.standing, 'check.run') ? [{ href: `${path}/checks`, label: 'Checks' }] : []),
    ...(can(viewer.role, build.standing, 'build.finish')
      ? [{ href: `${path}/final-check`, label: 'Final check' }]
      : []),
    { href: `${path}/window`, label: 'When' },
    { href: `${path}/people`, label: 'People' },
    ...(can(viewer.role, build.standing, 'entry.post') ? [{ href: `/bench/${build.orderNumber}`, label: 'Post' }] : []),
  ] satisfies { href: string; label: ReactNode }[];
  return (
    <>
      <FinishStyle finishHex={build.finishHex} nonce={await pageNonce()} />
      <SubNav
        label={build.instrument}
        links={links}
        back={isClientRole(viewer.role) ? { href: '/builds', label: 'Your builds' } : undefined}
      />
      <UnreachableNotice
        owners={unreachable}
        className="mx-4.5 mt-6 max-w-[77rem] md:mx-10 min-[82rem]:mx-auto print:hidden"
      />
      {children}
    </>
  );
}
