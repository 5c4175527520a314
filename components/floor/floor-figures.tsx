import type { FloorFigures } from '@/lib/floor/row';

const days = (count: number) => `${count} d`;

/** What the floor is like, in figures; a figure that asks for a look leads to the builds it counts. */
export function FloorHead({ figures, numbersOnly }: { figures: FloorFigures; numbersOnly: number }) {
  const all = figures.onFloor + numbersOnly;
  const facts = [
    { value: days(figures.longestSilenceDays), words: 'longest silence' },
    { value: String(figures.late), words: 'past their usual time' },
    { value: String(figures.waiting), words: figures.waiting === 1 ? 'stopped by a sign-off' : 'stopped by sign-offs' },
    ...(figures.held === null ? [] : [{ value: `${Math.round(figures.held * 100)} %`, words: 'of past windows held' }]),
  ];
  return (
    <div className="flex flex-wrap items-end justify-between gap-x-10 gap-y-5">
      <h1 className="text-3xl">
        {all === 1 ? 'One build on the floor' : `${all} builds on the floor`}
        {figures.quiet > 0 && `, ${figures.quiet} gone quiet`}
      </h1>
      <dl className="flex flex-wrap gap-x-6 gap-y-3 sm:gap-x-10">
        {facts.map(({ value, words }) => (
          <div key={words} className="flex flex-col-reverse">
            <dt className="text-sm text-soft">{words}</dt>
            <dd className="heading text-2xl tabular-nums">{value}</dd>
          </div>
        ))}
      </dl>
    </div>
  );
}
