import Link from 'next/link';
import type { ReactNode } from 'react';
import { sinceWords, StandingWords, type ListReader } from './question-standing';
import type { QuestionPage } from '@/db/queries/questions';
import { dayWords } from '@/lib/date-words';

type QuestionHeaderProps = { question: QuestionPage; reader: ListReader };

/** What is asked, on which build, and who must answer. */
export function QuestionHeader({ question, reader }: QuestionHeaderProps) {
  const isMine = question.penHolderId === reader.id;
  const { heldUntilAt } = question;
  return (
    <header className="border-b border-line bg-sheet">
      <div className="mx-auto flex max-w-[82rem] flex-wrap items-end justify-between gap-x-12 gap-y-5 px-4.5 py-6 md:px-10 md:py-8">
        <div className="max-w-[36rem]">
          <p className="narrow text-sm font-semibold text-soft">
            <Link
              href={`/builds/${question.orderNumber}`}
              className="inline-flex min-h-11 items-center text-finish-deep hover:underline md:min-h-6"
            >
              {question.orderNumber}&nbsp;<bdi>{question.instrument}</bdi>
            </Link>
            {' · '}
            {question.topic}
          </p>
          <h1 className="mt-1 text-3xl wrap-anywhere">
            <bdi>{question.subject}</bdi>
          </h1>
        </div>
        <dl className="flex flex-wrap gap-x-9 gap-y-3">
          <Fact name={sinceWords(question, reader)}>
            <StandingWords question={question} reader={reader} />
          </Fact>
          <Fact name={isMine ? 'hold the pen' : 'holds the pen'}>
            <bdi>{isMine ? 'You' : (question.penHolderName ?? (reader.isStaff ? 'Nobody yet' : 'The shop'))}</bdi>
          </Fact>
          {heldUntilAt !== null && heldUntilAt > reader.nowMs && (
            <Fact name="held from view until">{dayWords(heldUntilAt, reader.zone, reader.nowMs)}</Fact>
          )}
        </dl>
      </div>
    </header>
  );
}

/** The value stands over its name; a screen reader hears the name first. */
function Fact({ name, children }: { name: string; children: ReactNode }) {
  return (
    <div className="flex flex-col-reverse justify-end">
      <dt className="text-sm text-soft">{name}</dt>
      <dd className="font-semibold">{children}</dd>
    </div>
  );
}
