import { cache } from 'react';
import type { Metadata } from 'next';
import { end, pass, reopen } from './actions';
import { FinishStyle } from '@/components/builds/finish-style';
import { UnreachableNotice } from '@/components/people/unreachable-notice';
import { KeepFresh } from '@/components/questions/keep-fresh';
import { LetterList } from '@/components/questions/letter-list';
import { MarkRead } from '@/components/questions/mark-read';
import { QuestionHeader } from '@/components/questions/question-header';
import type { ListReader } from '@/components/questions/question-standing';
import { QuestionTools } from '@/components/questions/question-tools';
import { QuotedEntry } from '@/components/questions/quoted-entry';
import { Reply } from '@/components/questions/reply';
import { ShopMargin } from '@/components/questions/shop-margin';
import { listUnreachableOwners } from '@/db/queries/contacts';
import { listMargin } from '@/db/queries/margin';
import { listPenPasses, listPenTakers } from '@/db/queries/pen';
import { findPhraseValues, listPhrases } from '@/db/queries/phrases';
import { mayWrite, requireQuestion } from '@/db/queries/questions';
import type { SessionViewer } from '@/db/queries/sessions';
import { can, isStaffRole } from '@/lib/access';
import { orNotFound, pageViewer } from '@/lib/auth/page';
import { fillPhrase } from '@/lib/questions/phrases';
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
  const isWriter = mayWrite(viewer, question, reader.nowMs);
  const standing = reader.isStaff ? 'assigned' : 'owner';
  const [phrases, takers, unreachable] = await Promise.all([
    isWriter ? filledPhrases(viewer, question.id) : [],
    listPenTakers(viewer, question.id, reader.nowMs),
    can(viewer.role, standing, 'contacts.read') ? listUnreachableOwners(viewer, question.orderNumber) : [],
  ]);
  return (
    <>
      <FinishStyle finishHex={question.finishHex} nonce={await pageNonce()} />
      <KeepFresh questionId={question.id} mark={question.mark} />
      <MarkRead questionId={question.id} lastLetterAt={question.lastLetterAt} />
      <QuestionHeader question={question} reader={reader} />
      <div className="mx-auto grid max-w-[82rem] lg:grid-cols-[minmax(0,1fr)_23rem]">
        <div className="min-w-0 px-4.5 py-8 md:px-10">
          <UnreachableNotice owners={unreachable} className="mb-8" />
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
          <LetterList question={question} reader={reader} />
          <div className="max-w-[44rem] md:ml-32">
            <Reply question={question} reader={reader} mayWrite={isWriter} phrases={phrases} />
            <QuestionTools
              question={question}
              reader={reader}
              takers={takers}
              mayEnd={can(viewer.role, standing, 'question.end')}
              pass={pass}
              end={end}
              reopen={reopen}
            />
          </div>
        </div>
        {reader.isStaff && <Margin viewer={viewer} questionId={question.id} reader={reader} />}
      </div>
    </>
  );
}

async function filledPhrases(viewer: SessionViewer, questionId: string) {
  if (!isStaffRole(viewer.role)) return [];
  const [phrases, values] = await Promise.all([listPhrases(viewer), findPhraseValues(viewer, questionId, requestMs())]);
  return phrases.map(({ words, ...phrase }) => ({ ...phrase, ...fillPhrase(words, values) }));
}

async function Margin({
  viewer,
  questionId,
  reader,
}: {
  viewer: SessionViewer;
  questionId: string;
  reader: ListReader;
}) {
  const [notes, passes] = await Promise.all([listMargin(viewer, questionId), listPenPasses(viewer, questionId)]);
  return <ShopMargin questionId={questionId} notes={notes} passes={passes} reader={reader} />;
}
