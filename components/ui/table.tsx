import { clsx } from 'clsx';
import type { ComponentProps, ReactNode } from 'react';

type Column = { key: string; label: ReactNode; isNumeric?: boolean; className?: string };

/** A table that scrolls sideways on its own when the page is narrow, by keyboard too. Rows are `<Row>`s of `<Cell>`s. */
export function Table({
  caption,
  isCaptionHidden = true,
  columns,
  children,
  className,
}: {
  caption: string;
  isCaptionHidden?: boolean;
  columns: Column[];
  children: ReactNode;
  className?: string;
}) {
  return (
    <div role="region" aria-label={caption} tabIndex={0} className={clsx('relative overflow-x-auto', className)}>
      <table className="w-full border-collapse text-left">
        <caption className={isCaptionHidden ? 'sr-only' : 'heading pb-3 text-left text-xl'}>{caption}</caption>
        <thead>
          <tr className="border-b-2 border-ink">
            {columns.map((column) => (
              <th
                key={column.key}
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
        <tbody>{children}</tbody>
      </table>
    </div>
  );
}

export function Row({ className, ...row }: ComponentProps<'tr'>) {
  return <tr className={clsx('border-b border-line', className)} {...row} />;
}

const cellClass = 'px-3 py-3 align-top first:pl-0 last:pr-0';

/** One value; `note` is the smaller line under it. */
export function Cell({
  note,
  isNumeric = false,
  className,
  children,
  ...cell
}: ComponentProps<'td'> & { note?: ReactNode; isNumeric?: boolean }) {
  return (
    <td className={clsx(cellClass, isNumeric && 'text-right', className)} {...cell}>
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
    <th scope="row" className={clsx(cellClass, 'font-semibold', className)} {...cell}>
      {children}
      {note && <p className="text-sm font-normal text-soft">{note}</p>}
    </th>
  );
}
