import type { Metadata } from 'next';
import { PageFrame } from '@/components/people/page-frame';
import { ReadyCurve } from '@/components/schedule/ready-curve';
import { WindowMoves } from '@/components/schedule/window-moves';
import { EmptyState } from '@/components/ui/empty-state';
import { shopDay } from '@/db/queries/calendar';
import { windowStory } from '@/db/queries/ready-windows';
import { openBuild } from '@/lib/auth/page';
import { readySentence } from '@/lib/floor/said-window';
import { requestMs } from '@/lib/request';

export async function generateMetadata({ params }: PageProps<'/builds/[orderNumber]/window'>): Promise<Metadata> {
  return { title: `When ${(await params).orderNumber} will be ready` };
}

export default async function WindowPage({ params }: PageProps<'/builds/[orderNumber]/window'>) {
  const { viewer, build } = await openBuild((await params).orderNumber);
  const [{ window, moves, first }, today] = await Promise.all([
    windowStory(viewer, build.orderNumber),
    shopDay(requestMs()),
  ]);
  return (
    <PageFrame
      title="When it will be ready"
      over={`${build.orderNumber} ${build.instrument}`}
      intro="From how long each stage took for the instruments before yours, on the days we work. Of ten such windows, eight should hold. It is reckoned anew every day; when it moves by more than a few days, we tell you why."
    >
      {window ? (
        <p className="max-w-3xl text-xl font-semibold">{readySentence(window, today)}</p>
      ) : (
        <EmptyState title="There is no window">
          {build.deliveredAt === null
            ? 'It is either finished or was entered only just now. A window is reckoned within a minute.'
            : 'This instrument has been delivered.'}
        </EmptyState>
      )}
      <div className="grid gap-x-14 gap-y-10 lg:grid-cols-2">
        {window?.curve && window.earliestOn && window.latestOn && (
          <ReadyCurve curve={window.curve} earliestOn={window.earliestOn} latestOn={window.latestOn} today={today} />
        )}
        <WindowMoves moves={moves} first={first} today={today} />
      </div>
    </PageFrame>
  );
}
