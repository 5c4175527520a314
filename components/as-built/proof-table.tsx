import { clsx } from 'clsx';
import { photoHref } from '@/components/photos/photo-image';
import { DrawingLink } from '@/components/specs/drawing-link';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { AsBuiltRow, AsBuiltSheet } from '@/lib/as-built/sheet';

const columns = [
  { key: 'item', label: 'Item', className: 'w-[22%]' },
  { key: 'signed', label: 'As signed', className: 'w-[24%]' },
  { key: 'built', label: 'As built', className: 'w-[20%]' },
  { key: 'proof', label: 'Proof' },
];

type ProofTableProps = { group: AsBuiltSheet['groups'][number]; orderNumber: string };

/** One group of the spec: what was signed beside what was measured, and the entry that shows it. */
export function ProofTable({ group, orderNumber }: ProofTableProps) {
  return (
    <Table caption={group.name} isCaptionHidden={false} columns={columns} isStacked>
      {group.rows.map((row) => (
        <Row key={row.key}>
          <RowHead className="min-w-36">
            <bdi>{row.label}</bdi>
          </RowHead>
          <Cell title="As signed" note={row.allowed} className="min-w-28 font-semibold">
            <bdi>{row.signed}</bdi>
            {row.drawing && (
              <span className="block">
                <DrawingLink drawing={row.drawing} />
              </span>
            )}
          </Cell>
          <Built row={row} />
          <Cell title="Proof" className="min-w-44 max-md:col-span-2">
            <ProofOf row={row} orderNumber={orderNumber} />
          </Cell>
        </Row>
      ))}
    </Table>
  );
}

function Built({ row }: { row: AsBuiltRow }) {
  const isOff = row.state === 'out_of_tolerance';
  return (
    <Cell title="As built" className="min-w-32">
      {row.measured !== null && <bdi className="font-semibold">{row.measured}</bdi>}
      {row.measured !== null && row.within !== null && row.within !== row.allowed && (
        <p className="text-sm text-soft">{row.within}</p>
      )}
      <p className={clsx('text-sm', isOff ? 'font-semibold text-late' : 'text-soft')}>
        {row.state === 'open' && row.measured === null ? `not yet, ${row.stateWords}` : row.stateWords}
      </p>
    </Cell>
  );
}

function ProofOf({ row, orderNumber }: { row: AsBuiltRow; orderNumber: string }) {
  if (row.proof === null || row.entryId === null) return <span className="text-soft">not yet</span>;
  return (
    <span className="flex items-start gap-3">
      {row.photoId !== null && (
        <img
          src={photoHref(row.photoId, 320)}
          alt=""
          width={72}
          height={54}
          loading="lazy"
          decoding="async"
          className="h-13.5 w-18 shrink-0 rounded object-cover"
        />
      )}
      <a
        href={`/builds/${orderNumber}#entry-${row.entryId}`}
        className="font-semibold text-finish-deep hover:underline"
      >
        {row.proof}
      </a>
    </span>
  );
}
