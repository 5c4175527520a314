import Link from 'next/link';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { listBuildsByNumber } from '@/db/queries/builds';

type NumberedBuild = Awaited<ReturnType<typeof listBuildsByNumber>>[number];

const columns = [
  { key: 'order', label: 'Order' },
  { key: 'staff', label: 'Who is on it' },
];

/** Builds by number and nothing of what they are; the number leads to who may see it. */
export function BuildsTable({ builds }: { builds: NumberedBuild[] }) {
  return (
    <Table caption="Builds by number" columns={columns}>
      {builds.map(({ orderNumber, held, staff }) => (
        <Row key={orderNumber}>
          <RowHead
            className="whitespace-nowrap"
            note={held && <span className="font-semibold text-brass-deep">held from view</span>}
          >
            <Link
              prefetch={false}
              href={`/access/builds/${orderNumber}`}
              className="narrow text-finish-deep hover:underline"
            >
              {orderNumber}
            </Link>
          </RowHead>
          <Cell>
            {staff.length === 0 ? (
              <span className="font-semibold text-brass-deep">nobody yet</span>
            ) : (
              <ul role="list" className="flex flex-wrap gap-x-4 gap-y-1">
                {staff.map(({ id, name, cleared, steppedIn }) => (
                  <li key={id}>
                    <bdi>{name}</bdi> {steppedIn && <Mark>stepped in</Mark>}
                    {held && !cleared && <Mark>shut out by the hold</Mark>}
                  </li>
                ))}
              </ul>
            )}
          </Cell>
        </Row>
      ))}
    </Table>
  );
}

const Mark = ({ children }: { children: string }) => <span className="text-sm text-soft">({children})</span>;
