import { clsx } from 'clsx';
import { expected, LoadPlot } from './load-plot';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { DepartmentLoadRow } from '@/db/queries/load';
import { shortDate } from '@/lib/floor/short-range';

type DepartmentLoadProps = { load: DepartmentLoadRow; most: number };

function nowWords({ presentNow, unsayable }: DepartmentLoadRow): string {
  const here = presentNow === 1 ? 'One build is here now.' : `${presentNow} builds are here now.`;
  if (unsayable === 0) return here;
  const longer = unsayable === 1 ? 'One of them has been' : `${unsayable} of them have been`;
  return `${here} ${longer} longer in the stage than any before; where those go is not counted.`;
}

/** One department: what is here, and what comes. */
export function DepartmentLoad({ load, most }: DepartmentLoadProps) {
  const { name, capacityPerWeek, stages } = load;
  return (
    <section aria-label={name} className="flex flex-col gap-2 border-t-2 border-ink pt-3">
      <h2 className="text-xl first-letter:uppercase">{name}</h2>
      <p className="text-soft">
        {nowWords(load)}{' '}
        {capacityPerWeek === null ? 'Nobody has said how many it can take.' : `It can take ${capacityPerWeek} a week.`}
      </p>
      {stages.length > 0 && (
        <p className="text-sm">{stages.map((stage) => `${stage.name}: ${stage.count}`).join(' · ')}</p>
      )}
      <div className="mt-auto">
        <LoadPlot load={load} most={most} />
      </div>
    </section>
  );
}

/** The same as a table: who comes in each week, all departments. */
export function LoadTable({ loads }: { loads: readonly DepartmentLoadRow[] }) {
  const weeks = loads[0]?.weeks ?? [];
  const columns = [
    { key: 'name', label: 'Department' },
    { key: 'now', label: 'Now', isNumeric: true },
    { key: 'capacity', label: 'A week', isNumeric: true },
    ...weeks.map(({ weekStartsOn }) => ({ key: weekStartsOn, label: shortDate(weekStartsOn), isNumeric: true })),
  ];
  return (
    <Table caption="Builds expected to come in, by week" isCaptionHidden={false} columns={columns}>
      {loads.map(({ key, name, presentNow, capacityPerWeek, weeks: own }) => (
        <Row key={key}>
          <RowHead className="whitespace-nowrap">{name}</RowHead>
          <Cell isNumeric>{presentNow}</Cell>
          <Cell isNumeric>{capacityPerWeek ?? 'not said'}</Cell>
          {own.map(({ weekStartsOn, arriving, isOverCapacity }) => (
            <Cell key={weekStartsOn} isNumeric className={clsx(isOverCapacity && 'font-semibold text-late')}>
              {expected(arriving)}
              {isOverCapacity && <span className="sr-only"> , more than it can take</span>}
            </Cell>
          ))}
        </Row>
      ))}
    </Table>
  );
}
