import { Letter } from './letter';
import type { ListReader } from './question-standing';
import type { QuestionPage } from '@/db/queries/questions';
import { readersOf } from '@/lib/questions/read-words';

/** The letters of a question, oldest first; under the newest, who of the other side has seen it. */
export function LetterList({ question, reader }: { question: QuestionPage; reader: ListReader }) {
  const newestId = question.letters.at(-1)?.id;
  return (
    <div role="log" aria-label="Letters">
      <ol role="list">
        {question.letters.map((letter) => (
          <Letter
            key={letter.id}
            letter={letter}
            questionId={question.id}
            viewerId={reader.id}
            zone={reader.zone}
            nowMs={reader.nowMs}
            readBy={letter.id === newestId ? readersOf(letter, question.readBy) : []}
          />
        ))}
      </ol>
    </div>
  );
}
