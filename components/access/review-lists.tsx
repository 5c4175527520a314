import Link from 'next/link';
import type { ReactNode } from 'react';
import { AssignmentWords } from './assignment-table';
import { PageSection } from '@/components/people/page-frame';
import { ruleWords, workWords } from '@/components/people/person-words';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { BuildReview } from '@/db/queries/access-review';
import { dayWords } from '@/lib/date-words';

type Assigned = BuildReview['staff'][number];

type ReviewListsProps = {
  review: BuildReview;
  endTool: (assigned: Assigned) => ReactNode;
  zone: string;
  nowMs: number;
};

/** Everybody who may see one build, and through what. */
export function ReviewLists({ review, endTool, zone, nowMs }: ReviewListsProps) {
  return (
    <>
      <PageSection title="From the shop">
        {review.staff.length > 0 && (
          <StaffTable staff={review.staff} isOpen={review.isOpen} endTool={endTool} zone={zone} nowMs={nowMs} />
        )}
        {review.byRule.map((rule) => (
          <p key={rule.id}>
            <PersonLink userId={rule.userId} name={rule.name} />, by rule: {ruleWords(rule)}.
          </p>
        ))}
        {review.staff.length + review.byRule.length === 0 && <p className="text-soft">Nobody yet.</p>}
      </PageSection>
      <PageSection title="On the client side">
        <ClientList clients={review.clients} />
      </PageSection>
    </>
  );
}

const columns = [
  { key: 'person', label: 'Person' },
  { key: 'since', label: 'On it since', className: 'hidden sm:table-cell' },
  { key: 'how', label: 'How' },
  { key: 'end', label: <span className="sr-only">Take off</span>, className: 'text-right' },
];

function StaffTable({
  staff,
  isOpen,
  endTool,
  zone,
  nowMs,
}: Omit<ReviewListsProps, 'review'> & Pick<BuildReview, 'staff' | 'isOpen'>) {
  return (
    <Table caption="Staff on this build" columns={columns}>
      {staff.map((assigned) => (
        <Row key={assigned.id}>
          <RowHead note={workWords(assigned)}>
            <PersonLink userId={assigned.userId} name={assigned.name} />
          </RowHead>
          <Cell className="hidden whitespace-nowrap sm:table-cell">{dayWords(assigned.startedAt, zone, nowMs)}</Cell>
          <Cell>
            <AssignmentWords {...assigned} />
            {!isOpen && !assigned.cleared && <span className="block text-sm text-soft">shut out by the hold</span>}
          </Cell>
          <Cell className="text-right">{endTool(assigned)}</Cell>
        </Row>
      ))}
    </Table>
  );
}

function ClientList({ clients }: Pick<BuildReview, 'clients'>) {
  if (clients === null)
    return <p className="text-soft">While it is held from view, whose it is can only be read by stepping in.</p>;
  if (clients.length === 0) return <p className="text-soft">No owner yet. Invite them with this order number.</p>;
  return (
    <ul role="list" className="grid gap-2">
      {clients.map(({ userId, name, role, standing }) => (
        <li key={userId}>
          <PersonLink userId={userId} name={name} />, {standing === 'owner' ? `owner, ${role}` : 'companion'}
        </li>
      ))}
    </ul>
  );
}

function PersonLink({ userId, name }: { userId: string; name: string }) {
  return (
    <Link prefetch={false} href={`/access/people/${userId}`} className="font-semibold text-finish-deep hover:underline">
      <bdi>{name}</bdi>
    </Link>
  );
}
