import Link from 'next/link';
import { penWords, sinceWords, StandingWords, type ListReader } from './question-standing';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { QuestionRow } from '@/db/queries/question-lists';

type QuestionListProps = { caption: string; questions: QuestionRow[]; reader: ListReader };

/** Questions as a table on a wide screen and as rows on a phone. */
export function QuestionList(props: QuestionListProps) {
  return (
    <>
      <div className="hidden md:block">
        <QuestionTable {...props} />
      </div>
      <ul role="list" aria-label={props.caption} className="border-t-2 border-ink md:hidden">
        {props.questions.map((question) => (
          <PhoneRow key={question.id} question={question} reader={props.reader} />
        ))}
      </ul>
    </>
  );
}

function QuestionTable({ caption, questions, reader }: QuestionListProps) {
  const columns = [
    { key: 'question', label: 'Question', className: 'w-2/5' },
    { key: 'build', label: 'Build' },
    ...(reader.isStaff ? [{ key: 'asker', label: 'Asked by' }] : []),
    { key: 'pen', label: 'Holds the pen' },
    { key: 'state', label: 'State' },
  ];
  return (
    <Table caption={caption} columns={columns}>
      {questions.map((question) => (
        <Row key={question.id} className="hover:bg-tint">
          <RowHead note={question.topic}>
            <Link
              data-question-link
              href={`/questions/${question.id}`}
              className="text-finish-deep wrap-anywhere hover:underline"
            >
              <bdi>{question.subject}</bdi>
            </Link>
          </RowHead>
          <Cell note={<bdi>{question.instrument}</bdi>}>
            <span className="narrow font-semibold">{question.orderNumber}</span>
          </Cell>
          {reader.isStaff && (
            <Cell>
              <bdi>{question.askerName}</bdi>
            </Cell>
          )}
          <Cell>
            <bdi>{penWords(question, reader)}</bdi>
          </Cell>
          <Cell note={sinceWords(question, reader)}>
            <StandingWords question={question} reader={reader} />
          </Cell>
        </Row>
      ))}
    </Table>
  );
}

function PhoneRow({ question, reader }: { question: QuestionRow; reader: ListReader }) {
  const people = [reader.isStaff && `${question.askerName} asks`, `${penWords(question, reader)} holds the pen`];
  return (
    <li className="relative grid gap-1 border-b border-line py-3.5">
      <p className="text-sm text-soft">
        <span className="narrow font-semibold">{question.orderNumber}</span> <bdi>{question.instrument}</bdi> ·{' '}
        {question.topic}
      </p>
      <Link
        data-question-link
        href={`/questions/${question.id}`}
        className="text-lg leading-snug font-semibold wrap-anywhere after:absolute after:inset-0"
      >
        <bdi>{question.subject}</bdi>
      </Link>
      <p className="text-sm text-soft">{people.filter(Boolean).join(' · ')}</p>
      <p className="text-sm">
        <StandingWords question={question} reader={reader} />{' '}
        <span className="text-soft">{sinceWords(question, reader)}</span>
      </p>
    </li>
  );
}
