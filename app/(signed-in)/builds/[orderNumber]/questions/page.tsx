import type { Metadata } from 'next';
import { NextPageLink } from '@/components/questions/next-page-link';
import { QuestionList } from '@/components/questions/question-list';
import { LinkButton } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { listBuildQuestions, parsePlace } from '@/db/queries/question-lists';
import { isStaffRole } from '@/lib/access';
import { orNotFound, pageViewer } from '@/lib/auth/page';
import { requestMs } from '@/lib/request';

type Props = PageProps<'/builds/[orderNumber]/questions'>;

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  return { title: `Questions on ${(await params).orderNumber}` };
}

export default async function BuildQuestionsPage({ params, searchParams }: Props) {
  const viewer = await pageViewer();
  const { orderNumber } = await params;
  const { after } = await searchParams;
  const { questions, next } = await orNotFound(listBuildQuestions(viewer, orderNumber, parsePlace(after)));
  const path = `/builds/${orderNumber}/questions`;
  const isStaff = isStaffRole(viewer.role);
  const ask = isStaff ? null : <LinkButton href={`${path}/new`}>Ask the shop</LinkButton>;
  const title = `Questions on ${orderNumber}`;
  return (
    <div className="mx-auto grid max-w-[82rem] gap-6 px-4.5 py-8 md:px-10 md:py-10">
      <div className="flex flex-wrap items-center justify-between gap-4">
        <h1 className="text-3xl">{title}</h1>
        {questions.length > 0 && ask}
      </div>
      {questions.length === 0 ? (
        <EmptyState title={isStaff ? 'Nobody has asked anything' : 'You have asked nothing yet'} action={ask}>
          {isStaff
            ? 'When the owner asks about this build, it stands here.'
            : 'Ask about the build here, or from any entry of its diary. It goes to the person who can answer.'}
        </EmptyState>
      ) : (
        <QuestionList
          caption={title}
          questions={questions}
          reader={{ id: viewer.id, isStaff, zone: viewer.timeZone, nowMs: requestMs() }}
        />
      )}
      <NextPageLink path={path} next={next} />
    </div>
  );
}
