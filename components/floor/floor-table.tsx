import { clsx } from 'clsx';
import { FloorTableRow } from './floor-row';
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

/** The columns of the wide table; below that a row is a card of two columns. */
const tableClass = '[--floor-columns:8.5rem_9rem_minmax(12rem,1fr)_6rem_7rem_8.5rem_3.5rem]';

/** Said once for five hundred rows. Those out of sight are there, and cost no layout. */
const rowsClass =
  '*:grid *:grid-cols-[minmax(0,3fr)_minmax(0,2fr)] *:items-center *:gap-x-4 *:gap-y-1.5 *:border-b *:border-line *:px-4 *:py-3 ' +
  '*:[content-visibility:auto] *:[contain-intrinsic-size:auto_10.5rem] xl:*:[contain-intrinsic-size:auto_4rem] ' +
  'xl:*:min-h-16 xl:*:grid-cols-(--floor-columns) xl:*:px-3 xl:*:py-2';

/** All builds with their necks under one set of stage names; on a narrow page each is a card. */
export function FloorTable({ rows, routes, total, onMove }: FloorTableProps) {
  if (total === 0)
    return (
      <EmptyState title="No build fits that">
        Choose fewer things at once, or clear what you have chosen to see all that you are on.
      </EmptyState>
    );
  return (
    <div
      role="table"
      aria-label="Builds on the floor"
      aria-rowcount={total + 1}
      className={clsx('bg-sheet', tableClass)}
    >
      <div role="rowgroup">
        <TableHead names={commonRoute(rows, routes)?.stages.map(({ name }) => name) ?? []} />
      </div>
      <div role="rowgroup" className={rowsClass}>
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
      className="items-end border-b-2 border-ink pb-2 max-xl:sr-only xl:grid xl:grid-cols-(--floor-columns) xl:gap-x-4 xl:px-3"
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
