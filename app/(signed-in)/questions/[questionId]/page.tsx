import { cache } from 'react';
import type { Metadata } from 'next';
import { FinishStyle } from '@/components/builds/finish-style';
import { KeepFresh } from '@/components/questions/keep-fresh';
import { Letter } from '@/components/questions/letter';
import { QuestionHeader } from '@/components/questions/question-header';
import { QuotedEntry } from '@/components/questions/quoted-entry';
import { Reply } from '@/components/questions/reply';
import { mayWrite, requireQuestion } from '@/db/queries/questions';
import { isStaffRole } from '@/lib/access';
import { orNotFound, pageViewer } from '@/lib/auth/page';
import { pageNonce, requestMs } from '@/lib/request';

type Props = PageProps<'/questions/[questionId]'>;

const loadQuestion = cache(async (questionId: string) => orNotFound(requireQuestion(await pageViewer(), questionId)));

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  return { title: (await loadQuestion((await params).questionId)).subject };
}

export default async function QuestionPage({ params }: Props) {
  const viewer = await pageViewer();
  const question = await loadQuestion((await params).questionId);
  const reader = { id: viewer.id, isStaff: isStaffRole(viewer.role), zone: viewer.timeZone, nowMs: requestMs() };
  return (
    <>
      <FinishStyle finishHex={question.finishHex} nonce={await pageNonce()} />
      <KeepFresh questionId={question.id} mark={question.mark} />
      <QuestionHeader question={question} reader={reader} />
      <div className="mx-auto max-w-[82rem] px-4.5 py-8 md:px-10">
        {question.entry && (
          <div className="pb-9 md:pl-32">
            <QuotedEntry
              entry={question.entry}
              orderNumber={question.orderNumber}
              zone={reader.zone}
              nowMs={reader.nowMs}
            />
          </div>
        )}
        <div role="log" aria-label="Letters">
          <ol role="list">
            {question.letters.map((letter) => (
              <Letter key={letter.id} letter={letter} viewerId={viewer.id} zone={reader.zone} nowMs={reader.nowMs} />
            ))}
          </ol>
        </div>
        <div className="max-w-[44rem] md:ml-32">
          <Reply question={question} reader={reader} mayWrite={mayWrite(viewer, question)} />
        </div>
      </div>
    </>
  );
}
