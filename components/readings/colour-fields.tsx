import { saidAt, shownOf, type FieldsProps } from './fields';
import { LiveReading } from './live-reading';
import { ReadingInput } from './reading-input';
import { Notice } from '@/components/ui/notice';
import { Segmented } from '@/components/ui/segmented';
import { Select } from '@/components/ui/select';
import { PHOTO_COLOUR_SENTENCE } from '@/lib/craft/colour-difference';
import type { ColourLine } from '@/lib/readings/colour';
import { colourChosen } from '@/lib/readings/read-typed';

const whites = [
  { value: 'D65', label: 'D65' },
  { value: 'D50', label: 'D50' },
];

const axes = ['l', 'a', 'b'] as const;

/** A colour as the instrument shows it, against the approved sample. */
export function ColourFields({ colours, ...props }: FieldsProps & { colours: ColourLine[] }) {
  const { typed, read, onType } = props;
  const { doubt } = saidAt('illuminant', props);
  return (
    <div className="grid gap-4">
      {colours.length === 0 && <p className="text-soft">The spec has no approved colour yet; the figures are kept.</p>}
      {colours.length > 1 && (
        <Select
          label="Which colour"
          controlSize="bench"
          options={colours.map(({ itemKey, label }) => ({ value: itemKey, label }))}
          value={colourChosen(colours, typed)?.itemKey}
          onChange={({ target }) => onType({ colourItem: target.value })}
        />
      )}
      <div className="grid grid-cols-3 items-start gap-3">
        {axes.map((axis) => (
          <ReadingInput
            key={axis}
            label={axis === 'l' ? 'L' : axis}
            inputMode="text"
            value={typed[axis]}
            onType={(text) => onType({ [axis]: text })}
            {...saidAt(axis, props)}
          />
        ))}
      </div>
      <Segmented
        legend="Light of the instrument"
        name="illuminant"
        size="bench"
        options={whites}
        value={typed.illuminant}
        onChange={({ target }) => onType({ illuminant: target.value === 'D50' ? 'D50' : 'D65' })}
      />
      {doubt && (
        <Notice tone="late" role="alert">
          {doubt.sentence}
        </Notice>
      )}
      <p className="text-sm text-soft">{PHOTO_COLOUR_SENTENCE}</p>
      <LiveReading reading={shownOf(read, 'colour')} />
    </div>
  );
}
