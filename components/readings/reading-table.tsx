import { clsx } from 'clsx';
import { PageSection } from '@/components/people/page-frame';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { ReadingRow } from '@/db/queries/readings';
import { clockWords, dayWords } from '@/lib/date-words';

type ReadingTableProps = { readings: ReadingRow[]; orderNumber: string; zone: string; nowMs: number };

const columns = [
  { key: 'when', label: 'When', className: 'min-w-32' },
  { key: 'what', label: 'What', className: 'min-w-36' },
  { key: 'figures', label: 'Reading', isNumeric: true, className: 'min-w-36' },
  { key: 'words', label: 'How it stands', className: 'min-w-48' },
  { key: 'stage', label: 'Stage', className: 'min-w-28' },
];

/** Every reading of the build, newest first, each with the way to its entry. */
export function ReadingTable({ readings, orderNumber, zone, nowMs }: ReadingTableProps) {
  return (
    <PageSection title="All readings">
      <Table caption="All readings" columns={columns}>
        {readings.toReversed().map(({ id, entryId, takenAt, stage, author, shown }) => (
          <Row key={id}>
            <RowHead className="font-normal">
              <a
                href={`/builds/${orderNumber}#entry-${entryId}`}
                className="inline-flex min-h-6 items-center text-finish-deep underline underline-offset-4"
              >
                {dayWords(takenAt, zone, nowMs)}, {clockWords(takenAt, zone)}
              </a>
            </RowHead>
            <Cell>{shown?.label ?? 'A reading that can no longer be read'}</Cell>
            <Cell isNumeric>{shown?.figures}</Cell>
            <Cell className={clsx(shown?.standing === 'outside' && 'text-late')}>{shown?.words}</Cell>
            <Cell note={<bdi>{author}</bdi>}>{stage}</Cell>
          </Row>
        ))}
      </Table>
    </PageSection>
  );
}
