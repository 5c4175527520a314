import type { Metadata } from 'next';
import { release, withdraw } from './actions';
import { BuildAside } from '@/components/builds/build-aside';
import { BuildHeader } from '@/components/builds/build-header';
import { DiaryFeed } from '@/components/diary/diary-feed';
import { listClients, listStaff, listStages, newSince } from '@/db/queries/builds';
import { diaryPage, diaryState } from '@/db/queries/diary';
import { findMailSettings } from '@/db/queries/mail-settings';
import { can, isStaffRole } from '@/lib/access';
import { openBuild } from '@/lib/auth/page';
import { requestMs } from '@/lib/request';
import { stageNotes } from '@/lib/stage-notes';

export async function generateMetadata({ params }: PageProps<'/builds/[orderNumber]'>): Promise<Metadata> {
  return { title: `Diary of ${(await params).orderNumber}` };
}

export default async function DiaryPage({ params }: PageProps<'/builds/[orderNumber]'>) {
  const { orderNumber } = await params;
  const { viewer, build } = await openBuild(orderNumber);
  const [{ etag }, first, stages, staff, clients] = await Promise.all([
    diaryState(viewer, orderNumber),
    diaryPage(viewer, build.id, null),
    listStages(viewer, build.id),
    listStaff(viewer, build.id),
    listClients(viewer, orderNumber),
  ]);
  const mail = isStaffRole(viewer.role) ? null : await findMailSettings(viewer);
  const nowMs = requestMs();
  const may = (action: Parameters<typeof can>[2]) => can(viewer.role, build.standing, action);
  const tools = may('diary.read_shop_side')
    ? { viewerId: viewer.id, mayEditAny: may('entry.edit_any'), mayRelease: may('entry.release'), withdraw, release }
    : undefined;
  return (
    <>
      <BuildHeader
        build={build}
        stages={stages}
        ownerName={clients.find(({ standing }) => standing === 'owner')?.name}
        zone={viewer.timeZone}
        nowMs={nowMs}
      />
      <div className="mx-auto grid max-w-[82rem] gap-x-14 gap-y-10 px-4.5 py-8 md:px-10 lg:grid-cols-[minmax(0,1fr)_20rem]">
        <DiaryFeed
          first={first}
          etag={etag}
          viewerKey={viewer.id}
          orderNumber={build.orderNumber}
          zone={viewer.timeZone}
          nowMs={nowMs}
          newSinceMs={newSince(build, nowMs)}
          mayAsk={may('question.ask')}
          stageNotes={stageNotes(stages, viewer.timeZone, nowMs)}
          tools={tools}
        />
        <BuildAside
          build={build}
          staff={staff}
          mail={mail}
          zone={viewer.timeZone}
          mayAsk={may('question.ask')}
          mayPost={may('entry.post')}
        />
      </div>
    </>
  );
}
