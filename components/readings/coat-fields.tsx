import { saidAt, shownOf, type FieldsProps } from './fields';
import { LiveReading } from './live-reading';
import { FinishWindows } from './finish-windows';
import { ReadingInput } from './reading-input';
import { coverageWords } from '@/lib/readings/coat';

/** One coat: what was put on, and how thick it lies. */
export function CoatFields(props: FieldsProps) {
  const { typed, plan, read, onType } = props;
  const coat = read.readings.find(({ value }) => value.kind === 'coat')?.value;
  const coverage = coat?.kind === 'coat' ? coverageWords(coat) : null;
  const next = Math.max(0, ...plan.coatsBefore.map(({ coatNumber }) => coatNumber)) + 1;
  return (
    <div className="grid gap-4">
      <div className="grid grid-cols-[minmax(0,1fr)_6rem] items-start gap-3">
        <ReadingInput
          label="What was put on"
          inputMode="text"
          maxLength={80}
          value={typed.product}
          onType={(product) => onType({ product })}
          {...saidAt('product', props)}
        />
        <ReadingInput
          label="Coat"
          inputMode="numeric"
          value={typed.coatNumber}
          onType={(coatNumber) => onType({ coatNumber })}
          {...saidAt('coatNumber', props)}
        />
      </div>
      <p className="text-sm text-soft">
        The next coat is number {next}. Volume solids stand on the product&rsquo;s data sheet.
      </p>
      <div className="grid grid-cols-2 items-start gap-3">
        <ReadingInput
          label="Wet film"
          unit="µm"
          value={typed.wetFilm}
          onType={(wetFilm) => onType({ wetFilm })}
          {...saidAt('wetFilm', props)}
        />
        <ReadingInput
          label="Volume solids"
          unit="%"
          value={typed.volumeSolids}
          onType={(volumeSolids) => onType({ volumeSolids })}
          {...saidAt('volumeSolids', props)}
        />
      </div>
      <ReadingInput
        label="Dry film, where it was measured"
        unit="µm"
        value={typed.dryFilm}
        onType={(dryFilm) => onType({ dryFilm })}
        {...saidAt('dryFilm', props)}
      />
      <LiveReading reading={shownOf(read, 'coat')} />
      <p aria-live="polite" className="text-sm text-soft empty:hidden">
        {coverage}
      </p>
      <FinishWindows product={typed.product} lastCoatAtMs={plan.lastCoatAtMs} />
    </div>
  );
}
