import { PageSection } from '@/components/people/page-frame';
import { LinkButton } from '@/components/ui/button';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import { waitWords } from '@/lib/questions/wait-words';
import { dueWords } from '@/lib/questions/due-words';

type Stuck = { id: string; orderNumber: string; topic: string; askedAt: number; dueAt: number | null };

const columns = [
  { key: 'build', label: 'Build' },
  { key: 'topic', label: 'Topic' },
  { key: 'since', label: 'Waits' },
  { key: 'due', label: 'Answer' },
  { key: 'do', label: <span className="sr-only">What to do</span> },
];

/** Questions that nobody can answer: by number and topic, since an admin reads what was asked only on a build they are on. */
export function StuckQuestions({ stuck, zone, nowMs }: { stuck: Stuck[]; zone: string; nowMs: number }) {
  if (stuck.length === 0) return null;
  return (
    <PageSection title="Questions that nobody can answer">
      <p className="text-soft">Put a rep on the build: the question then goes to them by itself.</p>
      <Table caption="Questions that nobody can answer" columns={columns}>
        {stuck.map((question) => (
          <Row key={question.id}>
            <RowHead>
              <span className="narrow">{question.orderNumber}</span>
            </RowHead>
            <Cell>{question.topic}</Cell>
            <Cell>{waitWords(question.askedAt, nowMs)}</Cell>
            <Cell>{question.dueAt === null ? '' : dueWords(question.dueAt, zone, nowMs).short}</Cell>
            <Cell>
              <LinkButton variant="quiet" href={`/access/builds/${question.orderNumber}`}>
                Assign somebody<span className="sr-only"> to {question.orderNumber}</span>
              </LinkButton>
            </Cell>
          </Row>
        ))}
      </Table>
    </PageSection>
  );
}
