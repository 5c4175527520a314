import { SeriesPlot } from './series-plot';
import { PageSection } from '@/components/people/page-frame';
import type { ReadingSeries } from '@/lib/readings/series';

type When = { zone: string; nowMs: number };

/** The series of a build as plots; one without readings is left out. */
export function ReadingPlots({ series, ...when }: When & { series: ReadingSeries }) {
  const { moisture, settles, film, coatsWithoutFigures, colours } = series;
  return (
    <>
      {moisture.length + settles.length > 0 && (
        <PageSection title="Wood room">
          {moisture.length > 0 && (
            <SeriesPlot title="Moisture of the wood" points={moisture} unit="%" band={settlingBand(series)} {...when} />
          )}
          {settles.length > 0 && (
            <SeriesPlot title="Where wood settles in this air" points={settles} unit="%" {...when} />
          )}
          <p className="max-w-[62ch] text-soft">
            Wood takes up and gives off water until it agrees with the air around it. The band is where it settles in
            the air that was measured, give or take a quarter per cent.
          </p>
        </PageSection>
      )}
      {film.length > 0 && (
        <PageSection title="Film of the coats">
          <SeriesPlot title="All coats so far, dry" points={film} unit="µm" decimals={0} {...when} />
          {coatsWithoutFigures > 0 && (
            <p className="text-soft">
              {coatsWithoutFigures === 1 ? 'One coat was' : `${coatsWithoutFigures} coats were`} put on without figures
              and adds nothing here.
            </p>
          )}
          <p className="max-w-[62ch] text-soft">What is sanded off between coats is not taken away again.</p>
        </PageSection>
      )}
      {colours.length > 0 && (
        <PageSection title="Colour">
          {colours.map(({ label, limitDeltaE, points }) => (
            <SeriesPlot
              key={label}
              title={label}
              points={points}
              unit="ΔE"
              band={{ low: 0, high: limitDeltaE }}
              {...when}
            />
          ))}
        </PageSection>
      )}
    </>
  );
}

/** Finer than this the equation says nothing about a board. */
const GIVE_OR_TAKE_PERCENT = 0.25;

/** Where the wood is heading, over all the air that was measured. */
function settlingBand({ settles }: ReadingSeries) {
  if (settles.length === 0) return undefined;
  const values = settles.map(({ value }) => value);
  return { low: Math.min(...values) - GIVE_OR_TAKE_PERCENT, high: Math.max(...values) + GIVE_OR_TAKE_PERCENT };
}
