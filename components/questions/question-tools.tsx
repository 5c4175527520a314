import { PassPenForm } from './pass-pen-form';
import type { ListReader } from './question-standing';
import { ButtonForm } from '@/components/people/button-form';
import type { PenTaker } from '@/db/queries/pen';
import type { QuestionPage } from '@/db/queries/questions';
import type { FormAction } from '@/lib/action';
import { canReopen } from '@/lib/questions/thread-rules';

type QuestionToolsProps = {
  question: QuestionPage;
  reader: ListReader;
  takers: PenTaker[];
  mayEnd: boolean;
  pass: FormAction;
  end: FormAction;
  reopen: FormAction;
};

/** What can be done with a question beside writing: pass the pen, close it, take it up again. */
export function QuestionTools({ question, reader, takers, mayEnd, pass, end, reopen }: QuestionToolsProps) {
  const questionId = question.id;
  const isClosed = question.state === 'closed';
  const mayReopen = mayEnd && isClosed && canReopen(question.closedAt, reader.nowMs);
  if (takers.length === 0 && !mayReopen && (isClosed || !mayEnd)) return null;
  return (
    <div className="mt-6 flex flex-wrap items-start gap-3 border-t border-line pt-5 print:hidden">
      {takers.length > 0 && <PassPenForm pass={pass} questionId={questionId} takers={takers} />}
      {mayEnd && !isClosed && (
        <>
          <ButtonForm send={end} values={{ questionId, how: 'closed' }}>
            Close it
          </ButtonForm>
          {question.state === 'waiting' && (
            <ButtonForm send={end} values={{ questionId, how: 'no_answer_needed' }}>
              No answer needed
            </ButtonForm>
          )}
        </>
      )}
      {mayReopen && (
        <ButtonForm send={reopen} values={{ questionId }}>
          Open it again
        </ButtonForm>
      )}
    </div>
  );
}
