import { useState } from 'react';
import { PlainInput, PlainSelect } from './plain-fields';
import { FieldError } from '@/components/ui/field';
import { PHOTO_COLOUR_SENTENCE } from '@/lib/craft/colour-difference';
import type { AimedColour, LookItem, SpecItem } from '@/lib/specs/document';

type ColourFieldsProps = { item: LookItem; say: (item: SpecItem) => void; sentence?: string };

const figures = [
  { field: 'l', label: 'L' },
  { field: 'a', label: 'a' },
  { field: 'b', label: 'b' },
  { field: 'limitDeltaE', label: 'ΔE up to' },
] as const;

const lights = [
  { value: 'D65', label: 'D65' },
  { value: 'D50', label: 'D50' },
];

const unmeasured: AimedColour = { l: 50, a: 0, b: 0, illuminant: 'D65', limitDeltaE: 2 };

/** The colour of the approved sample as an instrument read it; a look without one is judged by eye. */
export function ColourFields({ item, say, sentence }: ColourFieldsProps) {
  const { label, colour } = item;
  if (!colour)
    return (
      <button
        type="button"
        onClick={() => say({ ...item, colour: unmeasured })}
        className="min-h-11 justify-self-start font-semibold text-finish-deep hover:underline"
      >
        Add a measured colour
      </button>
    );
  return (
    <span className="grid gap-1">
      <span className="grid grid-cols-3 gap-2 sm:grid-cols-5">
        {figures.map(({ field, label: name }) => (
          <FigureInput
            key={field}
            label={`${label}, ${name}`}
            name={name}
            value={colour[field]}
            say={(value) => say({ ...item, colour: { ...colour, [field]: value } })}
          />
        ))}
        <span className="grid gap-1 self-end">
          <PlainSelect
            label={`${label}, light`}
            value={colour.illuminant}
            say={(light) => say({ ...item, colour: { ...colour, illuminant: light === 'D50' ? 'D50' : 'D65' } })}
            options={lights}
          />
        </span>
      </span>
      <span className="text-sm text-soft">{PHOTO_COLOUR_SENTENCE}</span>
      <FieldError id={`${item.key}-colour`} error={sentence} />
      <button
        type="button"
        onClick={() => say({ ...item, colour: null })}
        className="min-h-11 justify-self-start text-soft hover:underline"
      >
        Leave the measured colour out
      </button>
    </span>
  );
}

type FigureProps = { label: string; name: string; value: number; say: (value: number) => void };

/** Keeps what was typed while it is not a number yet. */
function FigureInput({ label, name, value, say }: FigureProps) {
  const [typed, setTyped] = useState<string | null>(null);
  const read = (text: string) => (text.trim() === '' ? NaN : Number(text.replace(',', '.').replace('−', '-')));
  const isCurrent = typed !== null && Object.is(read(typed), value);
  return (
    <span className="grid gap-1">
      <span aria-hidden="true" className="text-xs text-soft">
        {name}
      </span>
      <PlainInput
        label={label}
        value={isCurrent ? typed : Number.isNaN(value) ? '' : String(value)}
        say={(text) => {
          setTyped(text);
          say(read(text));
        }}
      />
    </span>
  );
}
