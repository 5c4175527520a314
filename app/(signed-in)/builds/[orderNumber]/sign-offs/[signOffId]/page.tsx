import { cache } from 'react';
import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { askChange, sign, takeBack } from './actions';
import { ConfirmForm } from '@/components/people/confirm-form';
import { AnswerForms } from '@/components/sign-offs/answer-forms';
import { Answered, ContentMark } from '@/components/sign-offs/record';
import { SignOffChain } from '@/components/sign-offs/sign-off-chain';
import { SignOffHeader } from '@/components/sign-offs/sign-off-header';
import { Subject } from '@/components/sign-offs/subject';
import { LinkButton } from '@/components/ui/button';
import { shopDay } from '@/db/queries/calendar';
import { listDrawings } from '@/db/queries/documents';
import { listMaterials } from '@/db/queries/materials';
import { findItemLabel, findSubject } from '@/db/queries/sign-off-subjects';
import { requireSignOff, type SignOffPage } from '@/db/queries/sign-offs';
import { can } from '@/lib/access';
import { orNotFound, pageViewer } from '@/lib/auth/page';
import { requestMs } from '@/lib/request';
import { chainOf } from '@/lib/sign-offs/chain';
import { nameDrawings } from '@/lib/specs/drawings';

type Props = PageProps<'/builds/[orderNumber]/sign-offs/[signOffId]'>;

const load = cache(async (orderNumber: string, signOffId: string) => {
  const signOff = await orNotFound(requireSignOff(await pageViewer(), signOffId));
  return signOff.orderNumber === orderNumber ? signOff : notFound();
});

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const { orderNumber, signOffId } = await params;
  return { title: (await load(orderNumber, signOffId)).title };
}

export default async function SignOffPage({ params }: Props) {
  const { orderNumber, signOffId } = await params;
  const viewer = await pageViewer();
  const signOff = await load(orderNumber, signOffId);
  const nowMs = requestMs();
  const [subject, materials, drawings, itemLabel, today] = await Promise.all([
    findSubject(viewer, signOff),
    listMaterials(viewer, orderNumber),
    listDrawings(viewer, orderNumber),
    findItemLabel(viewer, signOff),
    shopDay(nowMs),
  ]);
  const reader = { zone: viewer.timeZone, nowMs, today };
  const may = (verb: 'sign_off.answer' | 'sign_off.ask') => can(viewer.role, signOff.standing, verb);
  const names = Object.fromEntries(materials.map(({ key, name }) => [key, name]));
  return (
    <div className="mx-auto grid max-w-[82rem] gap-x-14 gap-y-10 px-4.5 py-8 md:px-10 lg:grid-cols-[minmax(0,1fr)_20rem]">
      <div className="grid min-w-0 content-start gap-8">
        <SignOffHeader signOff={signOff} reader={reader} />
        <Answered signOff={signOff} reader={reader} />
        <Subject
          subject={subject}
          title={signOff.title}
          materials={names}
          drawings={nameDrawings(drawings, viewer.timeZone)}
          itemLabel={itemLabel}
        />
        {may('sign_off.answer') && signOff.state === 'asked' && (
          <AnswerForms
            signOffId={signOff.id}
            title={signOff.title}
            personName={viewer.name}
            sign={sign}
            askForChange={askChange}
          />
        )}
      </div>
      <aside className="grid min-w-0 content-start gap-8">
        {may('sign_off.ask') && <RepTools signOff={signOff} />}
        <ContentMark signOff={signOff} reader={reader} />
        <SignOffChain chain={chainOf(signOff.ofBuild, signOff.id)} currentId={signOff.id} reader={reader} />
      </aside>
    </div>
  );
}

function RepTools({ signOff: { id, orderNumber, kind, state, title } }: { signOff: SignOffPage }) {
  const isOpen = state === 'asked' || state === 'change_asked';
  const isDocument = kind === 'drawing' || kind === 'sample';
  return (
    <div className="grid justify-items-start gap-3">
      {isDocument && state !== 'superseded' && state !== 'withdrawn' && (
        <LinkButton href={`/builds/${orderNumber}/sign-offs/new?replaces=${id}`} isWide>
          Send another in its place
        </LinkButton>
      )}
      {isOpen && (
        <ConfirmForm
          send={takeBack}
          values={{ signOffId: id }}
          label="Take it back"
          title={`Take back “${title}”?`}
          description="The owner no longer sees it, and no stage waits for it. It stays in the record."
        />
      )}
    </div>
  );
}
