import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { BenchHeader } from '@/components/bench/bench-header';
import { PostForm } from '@/components/bench/post-form';
import { FinishStyle } from '@/components/builds/finish-style';
import { listStages, requireBuild } from '@/db/queries/builds';
import { findBench } from '@/db/queries/readings';
import { can } from '@/lib/access';
import { orNotFound, pageViewer } from '@/lib/auth/page';
import { pageNonce } from '@/lib/request';

export async function generateMetadata({ params }: PageProps<'/bench/[orderNumber]'>): Promise<Metadata> {
  return { title: `Post to ${(await params).orderNumber}` };
}

export default async function PostPage({ params }: PageProps<'/bench/[orderNumber]'>) {
  const viewer = await pageViewer();
  const build = await orNotFound(requireBuild(viewer, (await params).orderNumber));
  if (!can(viewer.role, build.standing, 'entry.post')) notFound();
  const [stages, bench] = await Promise.all([listStages(viewer, build.id), findBench(viewer, build.orderNumber)]);
  return (
    <>
      <FinishStyle finishHex={build.finishHex} nonce={await pageNonce()} />
      <BenchHeader orderNumber={build.orderNumber} rack={build.rack} instrument={build.instrument} />
      <PostForm
        viewerId={viewer.id}
        orderNumber={build.orderNumber}
        bench={bench}
        stages={stages.map(({ id, key, name, work, startedAt, finishedAt }) => ({
          id,
          key,
          name,
          work,
          state: finishedAt !== null ? 'done' : startedAt !== null ? 'now' : 'ahead',
        }))}
        isHeldFirst={build.releaseNeeded && !can(viewer.role, build.standing, 'entry.release')}
      />
    </>
  );
}
