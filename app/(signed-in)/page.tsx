import { redirect } from 'next/navigation';
import { listBuilds } from '@/db/queries/builds';
import { isClientRole } from '@/lib/access';
import { pageViewer } from '@/lib/auth/page';
import { homeOf } from '@/lib/navigation';

/** Leads on to where this person works; somebody with one build straight into its diary. */
export default async function HomePage() {
  const viewer = await pageViewer();
  const builds = isClientRole(viewer.role) ? await listBuilds(viewer) : [];
  const [only, another] = builds;
  redirect(only && !another ? `/builds/${only.orderNumber}` : homeOf(viewer.role));
}
