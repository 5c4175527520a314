import { saidAt, type FieldsProps } from './fields';
import { LiveReading } from './live-reading';
import { ReadingInput } from './reading-input';
import { figuresOf } from '@/lib/craft/typed-form';
import { unitWord } from '@/lib/craft/units';
import type { MeasureLine } from '@/lib/readings/measure-line';

/** The measures of the stage, one field each, beside their aim. */
export function MeasureFields(props: FieldsProps) {
  const { typed, plan, read, onType } = props;
  const shown = new Map(read.shown.filter(({ kind }) => kind === 'measure').map((one) => [one.label, one]));
  return (
    <div className="grid gap-5">
      {plan.lines.map((line, index) => (
        <div key={line.key} className="grid gap-2">
          <ReadingInput
            label={line.label}
            hint={aimWords(line, plan.lines[index - 1])}
            inputMode="text"
            unit={unitWord(line.aim.unit)}
            value={typed.measures[line.key] ?? ''}
            onType={(text) => onType({ measures: { ...typed.measures, [line.key]: text } })}
            {...saidAt(line.key, props)}
          />
          <LiveReading reading={typed.measures[line.key]?.trim() ? shown.get(line.label) : undefined} />
        </div>
      ))}
    </div>
  );
}

/** How it is measured is said once for lines that follow each other. */
function aimWords({ aim, tolerance, how }: MeasureLine, before: MeasureLine | undefined): string {
  const allowed = tolerance === null ? '' : `, ${/^[+±]/.test(tolerance) ? tolerance : `± ${tolerance}`}`;
  return `Aim ${figuresOf(aim)}${allowed}.${how && how !== before?.how ? ` ${how}` : ''}`;
}
