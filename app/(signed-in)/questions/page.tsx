import type { Metadata } from 'next';
import { HeldEntries } from '@/components/questions/held-entries';
import { NextPageLink } from '@/components/questions/next-page-link';
import { QuestionList } from '@/components/questions/question-list';
import { QueueHead } from '@/components/questions/queue-head';
import { QueueKeys } from '@/components/questions/queue-keys';
import { LinkButton } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { countHeldEntries, listHeldEntries } from '@/db/queries/entries';
import {
  countQueue,
  listQueue,
  medianFirstAnswer,
  parsePlace,
  queueFilters,
  type QueueFilter,
} from '@/db/queries/question-lists';
import type { SessionViewer } from '@/db/queries/sessions';
import { isStaffRole, type Role } from '@/lib/access';
import { pageViewer } from '@/lib/auth/page';
import { requestMs } from '@/lib/request';

export const metadata: Metadata = { title: 'Questions' };

export default async function QuestionsPage({ searchParams }: PageProps<'/questions'>) {
  const viewer = await pageViewer();
  const { after, show } = await searchParams;
  const filter = queueFilters.find((name) => name === show) ?? 'all';
  const nowMs = requestMs();
  const { questions, next } = await listQueue(viewer, parsePlace(after), { filter, nowMs });
  const isStaff = isStaffRole(viewer.role);
  const title = isStaff ? 'Questions' : 'Your questions';
  const list = (
    <QuestionList
      caption={title}
      questions={questions}
      reader={{ id: viewer.id, isStaff, zone: viewer.timeZone, nowMs }}
    />
  );
  return (
    <div className="mx-auto grid max-w-[82rem] gap-6 px-4.5 py-8 md:px-10 md:py-10">
      <div className="flex flex-wrap items-center justify-between gap-4">
        <h1 className="text-3xl">{title}</h1>
        {isStaff && (
          <LinkButton variant="quiet" href="/questions/phrases" className="min-h-11">
            Saved phrases
          </LinkButton>
        )}
      </div>
      {isStaff && <Head viewer={viewer} filter={filter} />}
      {questions.length === 0 ? <NoQuestions role={viewer.role} filter={filter} /> : null}
      {questions.length > 0 && (isStaff ? <QueueKeys>{list}</QueueKeys> : list)}
      <NextPageLink path={filter === 'all' ? '/questions' : `/questions?show=${filter}`} next={next} />
      {isStaff && <Held viewer={viewer} />}
    </div>
  );
}

async function Head({ viewer, filter }: { viewer: SessionViewer; filter: QueueFilter }) {
  const nowMs = requestMs();
  const [counts, medianMin] = await Promise.all([countQueue(viewer, nowMs), medianFirstAnswer(viewer, nowMs)]);
  const role = viewer.role === 'builder' ? 'builder' : 'rep';
  return <QueueHead filter={filter} counts={counts} medianMin={medianMin} role={role} />;
}

async function Held({ viewer }: { viewer: SessionViewer }) {
  const [count, entries] = await Promise.all([countHeldEntries(viewer), listHeldEntries(viewer)]);
  return <HeldEntries entries={entries} count={count} zone={viewer.timeZone} nowMs={requestMs()} />;
}

function NoQuestions({ role, filter }: { role: Role; filter: QueueFilter }) {
  const builds = <LinkButton href="/builds">Go to your builds</LinkButton>;
  if (filter === 'late')
    return <EmptyState title="Nothing is late">Every answer that is due is still in time.</EmptyState>;
  if (role === 'builder') {
    return (
      <EmptyState title="Nobody waits for your answer" action={<LinkButton href="/bench">Go to the bench</LinkButton>}>
        When a question is given to you, it stands here and you get a mail.
      </EmptyState>
    );
  }
  if (filter === 'mine')
    return <EmptyState title="You hold no pen">Others on your builds hold the open ones.</EmptyState>;
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
