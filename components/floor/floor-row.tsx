import { clsx } from 'clsx';
import Link from 'next/link';
import { memo } from 'react';
import { FloorNeck } from './floor-neck';
import { placeWords, type FloorRoute, type FloorRow } from '@/lib/floor/row';

/** The columns of the wide table; below that a row is a card of two columns. */
export const columnsClass = 'xl:grid-cols-[9.5rem_9.5rem_minmax(12rem,1fr)_6.5rem_7rem_9rem_4.5rem] xl:gap-x-4 xl:px-3';

/** Rows out of sight are there, and cost no layout. */
const rowClass =
  'grid grid-cols-[minmax(0,1fr)_auto] items-center gap-x-4 gap-y-1.5 border-b border-line px-4 py-3 ' +
  'xl:min-h-16 xl:py-2 [content-visibility:auto] [contain-intrinsic-size:auto_10.5rem] xl:[contain-intrinsic-size:auto_4rem]';

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
    <div role="row" aria-rowindex={index} className={clsx(rowClass, columnsClass)}>
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
        <span className="block truncate text-sm text-soft">{underName(row)}</span>
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

function underName({ isHeld, waitsOn, rack }: FloorRow): string {
  const waits = waitsOn === 'buyer' ? 'waits on the buyer' : waitsOn === 'us' && 'waits on us';
  return [isHeld && 'held', waits || rack].filter(Boolean).join(' · ');
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
