import type { Metadata } from 'next';
import { release, withdraw } from './actions';
import { BuildAside } from '@/components/builds/build-aside';
import { BuildHeader } from '@/components/builds/build-header';
import { ReadyLine } from '@/components/schedule/ready-line';
import { DiaryFeed } from '@/components/diary/diary-feed';
import { keep, tell } from './checks/actions';
import { UndecidedChecks } from '@/components/checks/undecided-checks';
import { WaitingLines } from '@/components/sign-offs/waiting-lines';
import { shopDay } from '@/db/queries/calendar';
import { listUndecidedChecks } from '@/db/queries/checks';
import { listClients, listStaff, listStages, newSince } from '@/db/queries/builds';
import { diaryPage, diaryState } from '@/db/queries/diary';
import { findMailSettings } from '@/db/queries/mail-settings';
import { findWindow } from '@/db/queries/ready-windows';
import { listWaitingSignOffs } from '@/db/queries/sign-offs';
import { can, isStaffRole } from '@/lib/access';
import { findStageWords } from '@/db/queries/stage-words';
import { openBuild } from '@/lib/auth/page';
import { requestMs } from '@/lib/request';
import { stageNotes } from '@/lib/stage-notes';

export async function generateMetadata({ params }: PageProps<'/builds/[orderNumber]'>): Promise<Metadata> {
  return { title: `Diary of ${(await params).orderNumber}` };
}

export default async function DiaryPage({ params }: PageProps<'/builds/[orderNumber]'>) {
  const { orderNumber } = await params;
  const { viewer, build } = await openBuild(orderNumber);
  const nowMs = requestMs();
  const [{ etag }, first, stages, staff, clients, waiting, undecided, window, stageWords, today] = await Promise.all([
    diaryState(viewer, orderNumber),
    diaryPage(viewer, build.id, null),
    listStages(viewer, build.id),
    listStaff(viewer, build.id),
    listClients(viewer, orderNumber),
    listWaitingSignOffs(viewer, [build.id]),
    listUndecidedChecks(viewer, orderNumber),
    findWindow(viewer, build.id),
    findStageWords(viewer, orderNumber, nowMs),
    shopDay(nowMs),
  ]);
  const mail = isStaffRole(viewer.role) ? null : await findMailSettings(viewer);
  const may = (action: Parameters<typeof can>[2]) => can(viewer.role, build.standing, action);
  const tools = may('diary.read_shop_side')
    ? { viewerId: viewer.id, mayEditAny: may('entry.edit_any'), mayRelease: may('entry.release'), withdraw, release }
    : undefined;
  return (
    <>
      <BuildHeader
        build={build}
        stages={stages}
        blockedKeys={waiting.flatMap(({ blocksStageKey }) => blocksStageKey ?? [])}
        ownerName={clients.find(({ standing }) => standing === 'owner')?.name}
        zone={viewer.timeZone}
        nowMs={nowMs}
      >
        <ReadyLine orderNumber={build.orderNumber} window={window} stageWords={stageWords} today={today} />
      </BuildHeader>
      <div className="mx-auto grid max-w-[82rem] gap-x-14 gap-y-10 px-4.5 py-8 md:px-10 lg:grid-cols-[minmax(0,1fr)_20rem]">
        <div className="grid min-w-0 content-start gap-8">
          <UndecidedChecks runs={undecided} zone={viewer.timeZone} nowMs={nowMs} tell={tell} keep={keep} />
          {waiting.length > 0 && <WaitingLines waiting={waiting} today={today} nowMs={nowMs} />}
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
        </div>
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
