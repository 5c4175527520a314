import type { Metadata } from 'next';
import { NextPageLink } from '@/components/questions/next-page-link';
import { QuestionList } from '@/components/questions/question-list';
import { LinkButton } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { listQueue, parsePlace } from '@/db/queries/question-lists';
import { isStaffRole, type Role } from '@/lib/access';
import { pageViewer } from '@/lib/auth/page';
import { requestMs } from '@/lib/request';

export const metadata: Metadata = { title: 'Questions' };

export default async function QuestionsPage({ searchParams }: PageProps<'/questions'>) {
  const viewer = await pageViewer();
  const { questions, next } = await listQueue(viewer, parsePlace((await searchParams).after));
  const isStaff = isStaffRole(viewer.role);
  const title = isStaff ? 'Questions' : 'Your questions';
  return (
    <div className="mx-auto grid max-w-[82rem] gap-6 px-4.5 py-8 md:px-10 md:py-10">
      <h1 className="text-3xl">{title}</h1>
      {questions.length === 0 ? (
        <NoQuestions role={viewer.role} />
      ) : (
        <QuestionList
          caption={title}
          questions={questions}
          reader={{ id: viewer.id, isStaff, zone: viewer.timeZone, nowMs: requestMs() }}
        />
      )}
      <NextPageLink path="/questions" next={next} />
    </div>
  );
}

function NoQuestions({ role }: { role: Role }) {
  const builds = <LinkButton href="/builds">Go to your builds</LinkButton>;
  if (role === 'builder') {
    return (
      <EmptyState title="Nobody waits for your answer" action={<LinkButton href="/bench">Go to the bench</LinkButton>}>
        When a question is given to you, it stands here and you get a mail.
      </EmptyState>
    );
  }
  if (role === 'rep' || role === 'admin') {
    return (
      <EmptyState title="No questions on your builds" action={builds}>
        What the owners of your builds ask stands here, whoever holds the pen.
      </EmptyState>
    );
  }
  return (
    <EmptyState title="You have asked nothing yet" action={builds}>
      Open a build and ask from any of its entries, or about the build itself. It goes to the person who can answer.
    </EmptyState>
  );
}
