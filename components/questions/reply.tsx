import type { FilledPhrase } from './phrase-field';
import { ReplyForm } from './reply-form';
import type { ListReader } from './question-standing';
import { LinkButton } from '@/components/ui/button';
import type { QuestionPage } from '@/db/queries/questions';
import { firstName } from '@/lib/questions/people-words';
import { canReopen } from '@/lib/questions/thread-rules';

type ReplyProps = { question: QuestionPage; reader: ListReader; mayWrite: boolean; phrases: FilledPhrase[] };

/** Where the next letter is written, or who must write it. */
export function Reply({ question, reader, mayWrite, phrases }: ReplyProps) {
  return (
    <section aria-label="Next letter" className="border-t-2 border-ink pt-4">
      {mayWrite ? (
        <ReplyForm
          questionId={question.id}
          orderNumber={question.orderNumber}
          viewerId={reader.id}
          phrases={phrases}
          {...replyWords(question, reader)}
        />
      ) : (
        <Instead question={question} reader={reader} />
      )}
    </section>
  );
}

function Instead({ question, reader }: { question: QuestionPage; reader: ListReader }) {
  if (question.state === 'closed' && !canReopen(question.closedAt, reader.nowMs)) {
    return (
      <div className="grid justify-items-start gap-3">
        <p className="text-soft">This question was closed more than 30 days ago, so it is a page of the past.</p>
        {!reader.isStaff && (
          <LinkButton href={`/builds/${question.orderNumber}/questions/new`}>Ask a new question</LinkButton>
        )}
      </div>
    );
  }
  return (
    <p className="text-soft">
      {question.penHolderName
        ? `${question.penHolderName} holds the pen and answers this.`
        : 'Nobody holds the pen yet. A rep of the build answers this.'}
    </p>
  );
}

function replyWords({ askerName, penHolderName, state }: QuestionPage, { isStaff }: ListReader) {
  const again = state === 'closed' ? ' It opens the question again.' : '';
  if (isStaff) {
    const asker = firstName(askerName);
    const mailWords = `${asker} gets this by mail in two minutes.${again}`;
    return { label: `Write to ${asker}`, button: 'Send answer', mailWords };
  }
  if (!penHolderName) {
    const mailWords = `Nobody holds the pen yet: the shop has it and finds somebody.${again}`;
    return { label: 'Write to the shop', button: 'Send letter', mailWords };
  }
  const answerer = firstName(penHolderName);
  const mailWords = `${answerer} gets this by mail in two minutes.${again}`;
  return { label: `Write to ${answerer}`, button: 'Send letter', mailWords };
}
