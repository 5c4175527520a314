import { clsx } from 'clsx';
import type { ComponentProps, ReactNode } from 'react';

type Column = { key: string; label: ReactNode; isNumeric?: boolean; className?: string };

/** On a narrow page each row is a card: its head over its cells, each under its `title`. */
const stackedClass =
  'max-md:[&_table]:block max-md:[&_tbody]:block max-md:[&_thead]:sr-only max-md:[&_tbody_tr]:grid max-md:[&_tbody_tr]:grid-cols-2 ' +
  'max-md:[&_tbody_tr]:gap-x-4 max-md:[&_tbody_tr]:gap-y-3 max-md:[&_tbody_tr]:py-4 max-md:[&_tbody_th]:col-span-2 ' +
  'max-md:[&_tbody_:is(td,th)]:min-w-0 max-md:[&_tbody_:is(td,th)]:p-0';

/**
 * A table that scrolls sideways on its own when the page is narrow, by keyboard too, or whose rows become cards there.
 * Rows are `<Row>`s of `<Cell>`s. The roles are said aloud because cards would lose them.
 */
export function Table({
  caption,
  isCaptionHidden = true,
  columns,
  children,
  isStacked = false,
  className,
}: {
  caption: string;
  isCaptionHidden?: boolean;
  columns: Column[];
  children: ReactNode;
  isStacked?: boolean;
  className?: string;
}) {
  return (
    <div
      role="region"
      aria-label={caption}
      tabIndex={0}
      className={clsx('relative overflow-x-auto', isStacked && stackedClass, className)}
    >
      <table role="table" className="w-full border-collapse text-left">
        <caption className={isCaptionHidden ? 'sr-only' : 'heading pb-3 text-left text-xl'}>{caption}</caption>
        <thead role="rowgroup">
          <tr role="row" className="border-b-2 border-ink">
            {columns.map((column) => (
              <th
                key={column.key}
                role="columnheader"
                scope="col"
                className={clsx(
                  'px-3 py-2 align-bottom text-sm font-semibold text-soft first:pl-0 last:pr-0',
                  column.isNumeric && 'text-right',
                  column.className,
                )}
              >
                {column.label}
              </th>
            ))}
          </tr>
        </thead>
        <tbody role="rowgroup">{children}</tbody>
      </table>
    </div>
  );
}

export function Row({ className, ...row }: ComponentProps<'tr'>) {
  return <tr role="row" className={clsx('border-b border-line', className)} {...row} />;
}

const cellClass = 'px-3 py-3 align-top first:pl-0 last:pr-0';

/** One value; `note` is the smaller line under it, `title` its column, read over it where rows are cards. */
export function Cell({
  title,
  note,
  isNumeric = false,
  className,
  children,
  ...cell
}: ComponentProps<'td'> & { title?: string; note?: ReactNode; isNumeric?: boolean }) {
  return (
    <td role="cell" className={clsx(cellClass, isNumeric && 'text-right', className)} {...cell}>
      {title && (
        <span aria-hidden="true" className="block text-xs font-normal text-soft md:hidden">
          {title}
        </span>
      )}
      {children}
      {note && <p className="text-sm text-soft">{note}</p>}
    </td>
  );
}

/** The cell that names its row. */
export function RowHead({
  note,
  className,
  children,
  ...cell
}: Omit<ComponentProps<'th'>, 'scope'> & { note?: ReactNode }) {
  return (
    <th role="rowheader" scope="row" className={clsx(cellClass, 'font-semibold', className)} {...cell}>
      {children}
      {note && <p className="text-sm font-normal text-soft">{note}</p>}
    </th>
  );
}
