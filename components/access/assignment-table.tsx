import Link from 'next/link';
import type { ReactNode } from 'react';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { AssignmentRow } from '@/db/queries/access-review';
import { dayWords } from '@/lib/date-words';

const columns = [
  { key: 'order', label: 'Order' },
  { key: 'since', label: 'On it since', className: 'hidden sm:table-cell' },
  { key: 'how', label: 'How' },
  { key: 'end', label: <span className="sr-only">Take off</span>, className: 'text-right' },
];

type AssignmentTableProps = {
  assignments: AssignmentRow[];
  endTool: (assignment: AssignmentRow) => ReactNode;
  zone: string;
  nowMs: number;
};

/** The builds somebody works on. */
export function AssignmentTable({ assignments, endTool, zone, nowMs }: AssignmentTableProps) {
  return (
    <Table caption="Assignments" columns={columns}>
      {assignments.map((assignment) => (
        <Row key={assignment.id}>
          <RowHead note={!assignment.isOpen && <span className="font-semibold text-brass-deep">held from view</span>}>
            <Link
              prefetch={false}
              href={`/access/builds/${assignment.orderNumber}`}
              className="narrow text-finish-deep hover:underline"
            >
              {assignment.orderNumber}
            </Link>
          </RowHead>
          <Cell className="hidden whitespace-nowrap sm:table-cell">{dayWords(assignment.startedAt, zone, nowMs)}</Cell>
          <Cell>
            <AssignmentWords {...assignment} />
          </Cell>
          <Cell className="text-right">{endTool(assignment)}</Cell>
        </Row>
      ))}
    </Table>
  );
}

/** Assigned, cleared for a hold, or stepped in and why. */
export function AssignmentWords({ cleared, stepInReason }: { cleared: boolean; stepInReason: string | null }) {
  if (stepInReason !== null)
    return (
      <>
        stepped in: <q className="font-read">{stepInReason}</q>
      </>
    );
  return cleared ? 'assigned, cleared for a hold' : 'assigned';
}
