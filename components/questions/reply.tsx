import { ReplyForm } from './reply-form';
import type { ListReader } from './question-standing';
import type { QuestionPage } from '@/db/queries/questions';
import { firstName } from '@/lib/questions/people-words';

type ReplyProps = { question: QuestionPage; reader: ListReader; mayWrite: boolean };

/** Where the next letter is written, or who must write it. */
export function Reply({ question, reader, mayWrite }: ReplyProps) {
  return (
    <section aria-label="Next letter" className="border-t-2 border-ink pt-4">
      {mayWrite ? (
        <ReplyForm questionId={question.id} viewerId={reader.id} {...replyWords(question, reader)} />
      ) : (
        <p className="text-soft">
          {question.penHolderName
            ? `${question.penHolderName} holds the pen and answers this.`
            : 'Nobody holds the pen yet. A rep of the build answers this.'}
        </p>
      )}
    </section>
  );
}

function replyWords({ askerName, penHolderName }: QuestionPage, { isStaff }: ListReader) {
  if (isStaff) {
    const asker = firstName(askerName);
    return { label: `Write to ${asker}`, button: 'Send answer', mailWords: `${asker} gets this by mail at once` };
  }
  if (!penHolderName) {
    const mailWords = 'Nobody holds the pen yet. The reps of your build find this among their questions.';
    return { label: 'Write to the shop', button: 'Send letter', mailWords };
  }
  const answerer = firstName(penHolderName);
  return { label: `Write to ${answerer}`, button: 'Send letter', mailWords: `${answerer} gets this by mail at once` };
}
