import { clsx } from 'clsx';
import { columnsClass, FloorTableRow } from './floor-row';
import { NeckNames } from '@/components/builds/neck-track-strip';
import { EmptyState } from '@/components/ui/empty-state';
import { commonRoute, type FloorRoute, type FloorRow } from '@/lib/floor/row';

type FloorTableProps = {
  rows: readonly FloorRow[];
  routes: readonly FloorRoute[];
  /** How many there will be when all have come. */
  total: number;
  onMove?: (row: FloorRow) => void;
};

/** All builds with their necks under one set of stage names; on a narrow page each is a card. */
export function FloorTable({ rows, routes, total, onMove }: FloorTableProps) {
  if (total === 0)
    return (
      <EmptyState title="No build fits that">
        Choose fewer things at once, or clear what you have chosen to see all that you are on.
      </EmptyState>
    );
  return (
    <div role="table" aria-label="Builds on the floor" aria-rowcount={total + 1} className="bg-sheet">
      <div role="rowgroup">
        <TableHead names={commonRoute(rows, routes)?.stages.map(({ name }) => name) ?? []} />
      </div>
      <div role="rowgroup">
        {rows.map((row, index) => (
          <FloorTableRow key={row.orderNumber} row={row} routes={routes} index={index + 2} onMove={onMove} />
        ))}
      </div>
    </div>
  );
}

const heads = 'text-sm font-semibold text-soft';

function TableHead({ names }: { names: string[] }) {
  return (
    <div
      role="row"
      aria-rowindex={1}
      className={clsx('items-end border-b-2 border-ink pb-2 max-xl:sr-only xl:grid', columnsClass)}
    >
      <span role="columnheader" className={heads}>
        Order
      </span>
      <span role="columnheader" className={heads}>
        For
      </span>
      <span role="columnheader" aria-label="Stages" className="min-w-0">
        <NeckNames names={names} className="!min-w-0 max-xl:hidden" />
      </span>
      <span role="columnheader" className={heads}>
        In this stage
      </span>
      <span role="columnheader" className={heads}>
        Buyer last saw
      </span>
      <span role="columnheader" className={heads}>
        Ready
      </span>
      <span role="columnheader" className="sr-only">
        Move
      </span>
    </div>
  );
}
