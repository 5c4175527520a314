import type { ReactNode } from 'react';
import { BuildNav } from '@/components/builds/build-nav';
import { FinishStyle } from '@/components/builds/finish-style';
import { openBuild } from '@/lib/auth/page';
import { can, isClientRole } from '@/lib/access';
import { pageNonce } from '@/lib/request';

/** Every page of a build wears its finish and carries the way to the others. It guards nothing by itself. */
export default async function BuildLayout({ children, params }: LayoutProps<'/builds/[orderNumber]'>) {
  const { viewer, build } = await openBuild((await params).orderNumber);
  const path = `/builds/${build.orderNumber}`;
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
      <BuildNav links={links} instrument={build.instrument} isAlone={isClientRole(viewer.role)} />
      {children}
    </>
  );
}
