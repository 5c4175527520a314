import { clsx } from 'clsx';
import { useId } from 'react';
import type { DepartmentLoadRow } from '@/db/queries/load';
import { shortDate } from '@/lib/floor/short-range';

const HEIGHT_PX = 96;

/** Builds to the tenth: they are expectations. */
export const expected = (count: number) => count.toFixed(1).replace(/\.0$/, '');

type LoadPlotProps = { load: DepartmentLoadRow; most: number };

/** What is expected to come to one department, week by week, beside what it can take; all drawn to one scale, `most`. */
export function LoadPlot({ load: { name, capacityPerWeek, weeks }, most }: LoadPlotProps) {
  const id = useId();
  const height = (count: number) => Math.round((count / Math.max(1, most)) * (HEIGHT_PX - 4));
  const step = 100 / weeks.length;
  const over = weeks.filter(({ isOverCapacity }) => isOverCapacity);
  const capacity = capacityPerWeek === null ? '' : ` It can take ${capacityPerWeek} a week.`;
  const worst = over.length === 0 ? '' : ` More than that in ${over.length} of ${weeks.length} weeks.`;
  return (
    <svg role="img" aria-labelledby={id} width="100%" height={HEIGHT_PX + 24} className="block text-sm">
      <title id={id}>{`Expected at ${name} in the next ${weeks.length} weeks.${capacity}${worst}`}</title>
      {weeks.map(({ weekStartsOn, arriving, isOverCapacity }, index) => (
        <rect
          key={weekStartsOn}
          x={`${index * step + step * 0.12}%`}
          width={`${step * 0.76}%`}
          y={HEIGHT_PX - height(arriving)}
          height={height(arriving)}
          className={clsx(isOverCapacity ? 'fill-late' : 'fill-finish')}
        />
      ))}
      <line x1="0" x2="100%" y1={HEIGHT_PX} y2={HEIGHT_PX} className="stroke-ink" />
      {capacityPerWeek !== null && (
        <line
          x1="0"
          x2="100%"
          y1={HEIGHT_PX - height(capacityPerWeek)}
          y2={HEIGHT_PX - height(capacityPerWeek)}
          strokeDasharray="6 4"
          className="stroke-ink"
        />
      )}
      {[0, weeks.length - 1].map((index) => (
        <text
          key={index}
          x={index === 0 ? '0' : '100%'}
          y={HEIGHT_PX + 18}
          textAnchor={index === 0 ? 'start' : 'end'}
          className="narrow fill-soft"
        >
          {index === 0 ? 'this week' : `week of ${shortDate(weeks[index]?.weekStartsOn ?? '')}`}
        </text>
      ))}
    </svg>
  );
}
