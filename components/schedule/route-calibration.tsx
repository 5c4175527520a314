import { CoveragePlot } from './coverage-plot';
import { SectionHeading } from '@/components/ui/section-heading';
import type { RouteCalibration } from '@/db/queries/calibration';
import { calibrationWords } from '@/lib/schedule/calibration';

const days = (value: number) => `${value.toFixed(1)} days`;

/** One route: how its windows held, what is made of it, and how far off they were. */
export function RouteCalibrationSection({ route }: { route: RouteCalibration }) {
  const { name, all, byStage, ofRoute, pinballDays, crpsDays } = route;
  const own = byStage.filter(({ adjustment }) => adjustment !== null);
  return (
    <section aria-label={name} className="grid content-start gap-3">
      <SectionHeading>{name}</SectionHeading>
      <p>{calibrationWords(all, ofRoute)}</p>
      {own.map(({ key, name: stage, coverage, adjustment }) => (
        <p key={key} className="text-soft">
          Given in {stage}: {calibrationWords(coverage, adjustment)}
        </p>
      ))}
      {byStage.length > 0 && <CoveragePlot title={name} rows={byStage} />}
      <dl className="flex flex-wrap gap-x-8 gap-y-1 text-sm text-soft">
        {pinballDays !== null && (
          <div className="flex gap-2">
            <dt>Mean pinball loss</dt>
            <dd className="tabular-nums">{days(pinballDays)}</dd>
          </div>
        )}
        {crpsDays !== null && (
          <div className="flex gap-2">
            <dt>Mean CRPS</dt>
            <dd className="tabular-nums">{days(crpsDays)}</dd>
          </div>
        )}
      </dl>
    </section>
  );
}
