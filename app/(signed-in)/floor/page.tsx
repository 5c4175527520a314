import type { Metadata } from 'next';
import { FloorBoard } from '@/components/floor/floor-board';
import { FloorNav } from '@/components/floor/floor-nav';
import { floorScreen } from '@/db/queries/floor';
import { orNotFound, pageViewer } from '@/lib/auth/page';
import { parseWish } from '@/lib/floor/wish';
import { requestMs } from '@/lib/request';

export const metadata: Metadata = { title: 'The floor' };

export default async function FloorPage({ searchParams }: PageProps<'/floor'>) {
  const [viewer, asked] = [await pageViewer(), await searchParams];
  const wish = parseWish((name) => {
    const value = asked[name];
    return typeof value === 'string' ? value : null;
  });
  const { first, total, choices } = await orNotFound(floorScreen(viewer, wish, requestMs()));
  return (
    <>
      <FloorNav />
      <div className="mx-auto grid max-w-[82rem] grid-cols-[minmax(0,1fr)] gap-5 px-4.5 py-8 md:px-10">
        <FloorBoard first={first} total={total} choices={choices} wish={wish} viewerKey={viewer.id} />
      </div>
    </>
  );
}
