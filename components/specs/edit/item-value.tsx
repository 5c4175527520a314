import { ColourFields } from './colour-fields';
import { DrawingField } from './drawing-field';
import { PlainInput, PlainSelect } from './plain-fields';
import { useSurroundings } from './surroundings';
import { unitWord, type Unit } from '@/lib/craft/units';
import type { ChoiceItem, LookItem, MaterialItem, MeasureItem, SpecItem } from '@/lib/specs/document';
import { toleranceFrom, toleranceText } from '@/lib/specs/tolerance';

export type Sentences = Readonly<Record<string, string>>;
type ValueProps<T extends SpecItem> = {
  item: T;
  say: (item: SpecItem) => void;
  sentences: Sentences;
  /** What can be taken over with one press, where something else has changed. */
  suggestion?: string;
};

const units: Unit[] = ['in', 'mm', 'thou', '64ths', 'um', 'deg', 'cents', 'kohm', 'g', 'percent', 'count', 'dE', 'lb'];
const unitOptions = units.map((unit) => ({ value: unit, label: unitWord(unit) || 'number' }));

/** The fields of one item by its kind. */
export function ItemValue({ item, ...rest }: ValueProps<SpecItem>) {
  if (item.kind === 'measure') return <MeasureFields item={item} {...rest} />;
  if (item.kind === 'material') return <MaterialFields item={item} {...rest} />;
  if (item.kind === 'choice') return <ChoiceField item={item} {...rest} />;
  return <LookFields item={item} {...rest} />;
}

function MeasureFields({ item, say, sentences }: ValueProps<MeasureItem>) {
  const { label, aim, tolerance } = item;
  const setUnit = (typed: string) => {
    const unit = units.find((one) => one === typed);
    if (unit) say({ ...item, aim: { ...aim, unit } });
  };
  return (
    <span className="grid grid-cols-[minmax(0,1fr)_6.5rem] gap-2 sm:grid-cols-[minmax(0,1fr)_6.5rem_minmax(0,1fr)]">
      <PlainInput
        label={label}
        value={aim.text}
        say={(text) => say({ ...item, aim: { ...aim, text } })}
        sentence={sentences.aim ?? sentences.value}
      />
      <PlainSelect label={`${label}, unit`} value={aim.unit} say={setUnit} options={unitOptions} />
      <PlainInput
        label={`${label}, tolerance`}
        value={tolerance ? toleranceText(tolerance) : ''}
        say={(text) => say({ ...item, tolerance: toleranceFrom(text) })}
        sentence={sentences.tolerance}
        placeholder="no tolerance"
        className="col-span-2 sm:col-span-1"
      />
    </span>
  );
}

function MaterialFields({ item, say, sentences }: ValueProps<MaterialItem>) {
  const { materials } = useSurroundings();
  const { label, materialKey, words } = item;
  return (
    <span className="grid grid-cols-[minmax(0,1fr)] gap-2 sm:grid-cols-2">
      <PlainSelect
        label={label}
        value={materialKey ?? ''}
        say={(key) => say({ ...item, materialKey: key === '' ? null : key })}
        options={materials}
        prompt="in words only"
        sentence={sentences.materialKey ?? sentences.value}
      />
      <PlainInput
        label={`${label}, in words`}
        value={words}
        say={(text) => say({ ...item, words: text })}
        sentence={sentences.words}
        placeholder="cut, pieces, figure"
      />
    </span>
  );
}

function ChoiceField({ item, say, sentences, suggestion }: ValueProps<ChoiceItem>) {
  const { label, value, options } = item;
  if (options.length > 0) {
    const known = options.includes(value) ? options : [value, ...options];
    return (
      <PlainSelect
        label={label}
        value={value}
        say={(chosen) => say({ ...item, value: chosen })}
        options={known.map((option) => ({ value: option, label: option || 'Choose' }))}
        sentence={sentences.value}
      />
    );
  }
  return (
    <span className="grid grid-cols-[minmax(0,1fr)] justify-items-start gap-1">
      <PlainInput
        label={label}
        value={value}
        say={(text) => say({ ...item, value: text })}
        sentence={sentences.value}
        className="w-full"
      />
      {suggestion && (
        <button
          type="button"
          onClick={() => say({ ...item, value: suggestion })}
          className="min-h-11 text-left font-semibold text-finish-deep hover:underline"
        >
          Use {suggestion}
        </button>
      )}
    </span>
  );
}

function LookFields({ item, say, sentences }: ValueProps<LookItem>) {
  return (
    <span className="grid grid-cols-[minmax(0,1fr)] gap-2">
      <PlainInput
        label={item.label}
        value={item.words}
        say={(text) => say({ ...item, words: text })}
        sentence={sentences.words ?? sentences.value}
      />
      <DrawingField item={item} say={say} sentence={sentences.drawing} />
      <ColourFields item={item} say={say} sentence={sentences.colour} />
    </span>
  );
}
