import { stagesOfRow, type FloorRoute, type FloorRow } from '@/lib/floor/row';

type RackListProps = { rows: readonly FloorRow[]; routes: readonly FloorRoute[]; others: readonly string[] };

const cell = 'border-b border-line px-2 py-2.5 text-left align-top first:pl-0';

/** What stands on a rack, for the paper that hangs on it: a line a build, with a box to tick. */
export function RackList({ rows, routes, others }: RackListProps) {
  return (
    <>
      <div role="region" aria-label="Builds on the rack" tabIndex={0} className="relative overflow-x-auto">
        <table className="w-full border-collapse">
          <thead>
            <tr className="border-b-2 border-ink text-sm text-soft">
              {['Order', 'Instrument', 'Stage', 'Next', 'Ready', 'Done'].map((head) => (
                <th key={head} scope="col" className="px-2 py-2 text-left font-semibold first:pl-0">
                  {head}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {rows.map((row) => {
              const stages = stagesOfRow(row, routes);
              return (
                <tr key={row.orderNumber} className="break-inside-avoid">
                  <th scope="row" className={`${cell} narrow font-semibold whitespace-nowrap`}>
                    {row.orderNumber}
                  </th>
                  <td className={cell}>
                    <bdi>{row.instrument}</bdi>
                  </td>
                  <td className={cell}>{stages[row.at]?.name ?? 'all finished'}</td>
                  <td className={cell}>{stages[row.at + 1]?.name ?? 'none'}</td>
                  <td className={`${cell} whitespace-nowrap`}>{row.ready}</td>
                  <td className={cell}>
                    <span aria-hidden="true" className="inline-block size-5 rounded-xs border-[1.5px] border-ink" />
                    <span className="sr-only">to be ticked on paper</span>
                  </td>
                </tr>
              );
            })}
          </tbody>
        </table>
      </div>
      {others.length > 0 && (
        <p className="text-soft">Also on it, by number only: {others.join(', ')}. You are not on these builds.</p>
      )}
    </>
  );
}
