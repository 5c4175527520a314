import { clsx } from 'clsx';
import Link from 'next/link';
import { memo } from 'react';
import { FloorNeck } from './floor-neck';
import { placeWords, type FloorRoute, type FloorRow } from '@/lib/floor/row';

const daysWords = (days: number) => (days === 1 ? '1 day' : `${days} days`);

type FloorRowProps = {
  row: FloorRow;
  routes: readonly FloorRoute[];
  /** Its place in the table, the head being 1. */
  index: number;
  onMove?: (row: FloorRow) => void;
};

export const FloorTableRow = memo(function FloorTableRow({ row, routes, index, onMove }: FloorRowProps) {
  return (
    <div role="row" aria-rowindex={index}>
      <div role="rowheader" className="min-w-0">
        <Link href={`/builds/${row.orderNumber}`} prefetch={false} className="narrow font-semibold hover:underline">
          {row.orderNumber}
        </Link>
        {row.isMine && (
          <span className="ml-2 rounded bg-tint px-1.5 text-xs font-semibold text-finish-deep">yours</span>
        )}
        <bdi className="block truncate text-sm text-soft">{row.instrument}</bdi>
      </div>
      <div role="cell" className="min-w-0 max-xl:text-right">
        <bdi className="block truncate">{row.ownerName ?? 'no owner yet'}</bdi>
        <bdi className="block truncate text-sm text-soft">{underName(row)}</bdi>
      </div>
      <div role="cell" className="max-xl:col-span-2">
        <FloorNeck row={row} routes={routes} />
      </div>
      <StageCell row={row} place={placeWords(row, routes)} />
      <SilenceCell row={row} />
      <div role="cell">
        <span className="text-soft xl:hidden">{row.ready === 'ready' ? '' : 'Ready '}</span>
        {row.ready}
        {row.isStopped && <span className="text-sm text-soft xl:block"> if signed today</span>}
      </div>
      <div role="cell" className="text-right">
        {onMove && (
          <button
            type="button"
            onClick={() => onMove(row)}
            aria-label={`Move ${row.orderNumber}`}
            className="min-h-11 px-2 font-semibold text-finish-deep -outline-offset-2 hover:underline"
          >
            Move
          </button>
        )}
      </div>
    </div>
  );
});

function underName({ isHeld, waits, rack }: FloorRow): string {
  const on = [...new Set(waits.map((wait) => wait.on))].join(', ');
  return [isHeld && 'held', on ? `waits on ${on}` : rack].filter(Boolean).join(' · ');
}

function StageCell({ row: { days, usual, isLate }, place }: { row: FloorRow; place: string }) {
  return (
    <div role="cell">
      <span className="text-sm text-soft xl:hidden">{place} </span>
      {days !== null && (
        <span className={clsx('tabular-nums', isLate && 'font-semibold text-late')}>
          {days} d{isLate && ', late'}
        </span>
      )}
      <span className="text-sm text-soft xl:block">
        {days !== null && usual && <span className="xl:hidden"> · </span>}
        {usual && (usual[0] === usual[1] ? `usual ${usual[0]}` : `usual ${usual[0]} to ${usual[1]}`)}
      </span>
    </div>
  );
}

function SilenceCell({ row: { silentDays, quiet } }: { row: FloorRow }) {
  const when = silentDays === 0 ? 'today' : `${daysWords(silentDays)} ago`;
  return (
    <div role="cell" className="max-xl:text-right">
      <span className={clsx('tabular-nums', quiet > 0 && 'font-semibold text-late')}>
        <span className="font-normal text-soft xl:hidden">seen </span>
        {when}
      </span>
      {quiet > 0 && <span className="text-sm font-semibold text-late xl:block"> quiet</span>}
    </div>
  );
}
