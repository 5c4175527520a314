import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { send } from './actions';
import { PageFrame } from '@/components/people/page-frame';
import { AskForm, type AskFormProps } from '@/components/sign-offs/ask-form';
import { Notice } from '@/components/ui/notice';
import { listStages } from '@/db/queries/builds';
import { shopDay } from '@/db/queries/calendar';
import { listLookItems } from '@/db/queries/sign-off-subjects';
import { requireSignOff } from '@/db/queries/sign-offs';
import { can } from '@/lib/access';
import { openBuild, orNotFound } from '@/lib/auth/page';
import { requestMs } from '@/lib/request';
import { dueRange } from '@/lib/sign-offs/due-day';
import type { SessionViewer } from '@/db/queries/sessions';

export const metadata: Metadata = { title: 'Send something to be signed' };

export default async function AskPage({ params, searchParams }: PageProps<'/builds/[orderNumber]/sign-offs/new'>) {
  const { orderNumber } = await params;
  const { viewer, build } = await openBuild(orderNumber);
  if (!can(viewer.role, build.standing, 'sign_off.ask')) notFound();
  const { replaces } = await searchParams;
  const [stages, items, today, replaced] = await Promise.all([
    listStages(viewer, build.id),
    listLookItems(viewer, orderNumber),
    shopDay(requestMs()),
    typeof replaces === 'string' ? findReplaced(viewer, replaces, orderNumber) : undefined,
  ]);
  const ahead = stages.filter(({ startedAt }) => startedAt === null);
  return (
    <PageFrame
      over={<span className="narrow">{build.orderNumber}</span>}
      title={replaced ? `In place of “${replaced.title}”` : 'Send something to be signed'}
      intro="The owner gets a mail, looks at it, and signs it or says what should be different."
    >
      {replaced?.answer && (
        <Notice tone="brass" title="What the owner asked for">
          <p className="font-read break-words whitespace-pre-line text-ink">{replaced.answer}</p>
        </Notice>
      )}
      <AskForm
        send={send}
        orderNumber={build.orderNumber}
        range={dueRange(today)}
        stages={ahead.map(({ key, name }) => ({ value: key, label: name }))}
        items={items.map(({ key, label }) => ({ value: key, label }))}
        replaced={replaced}
      />
    </PageFrame>
  );
}

async function findReplaced(viewer: SessionViewer, id: string, orderNumber: string): Promise<AskFormProps['replaced']> {
  const signOff = await orNotFound(requireSignOff(viewer, id));
  const { kind, itemKey, blocksStageKey, title, answer } = signOff;
  if (signOff.orderNumber !== orderNumber || (kind !== 'drawing' && kind !== 'sample')) notFound();
  return { id, kind, itemKey, blocksStageKey, title, answer };
}
