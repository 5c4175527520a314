import { Labelled, PlainInput, PlainSelect } from './plain-fields';
import { useSurroundings } from './surroundings';
import type { Sentences } from './item-value';
import { specGroups, type SpecItem } from '@/lib/specs/document';
import { groupName } from '@/lib/specs/groups';

type ItemDetailsProps = {
  item: SpecItem;
  say: (item: SpecItem) => void;
  takeOut: (key: string) => void;
  sentences: Sentences;
};

const groups = specGroups.map((group) => ({ value: group, label: groupName(group) }));

/** What is said about an item rather than of it: its name, place, and the stages that freeze and prove it. */
export function ItemDetails({ item, say, takeOut, sentences }: ItemDetailsProps) {
  const { stages } = useSurroundings();
  const { label } = item;
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-3 rounded border border-line bg-sheet p-3 sm:grid-cols-2">
      <Labelled label="Name">
        <PlainInput
          label={`Name of ${label}`}
          value={label}
          say={(text) => say({ ...item, label: text })}
          sentence={sentences.label}
        />
      </Labelled>
      <Labelled label="Group">
        <PlainSelect
          label={`Group of ${label}`}
          value={item.group}
          say={(value) => say({ ...item, group: specGroups.find((group) => group === value) ?? item.group })}
          options={groups}
        />
      </Labelled>
      <Labelled label="Frozen from">
        <PlainSelect
          label={`${label} is frozen from`}
          value={item.frozenFrom ?? ''}
          say={(key) => say({ ...item, frozenFrom: key === '' ? null : key })}
          options={stages}
          prompt="never"
          sentence={sentences.frozenFrom}
        />
      </Labelled>
      <Labelled label="Proven at">
        <PlainSelect
          label={`${label} is proven at`}
          value={item.provenAt ?? ''}
          say={(key) => say({ ...item, provenAt: key === '' ? null : key })}
          options={stages}
          prompt="no stage"
          sentence={sentences.provenAt}
        />
      </Labelled>
      {item.kind === 'choice' && <Choices item={item} say={say} />}
      <button
        type="button"
        onClick={() => takeOut(item.key)}
        className="min-h-11 justify-self-start font-semibold text-late hover:underline"
      >
        Take {label || 'this item'} out
      </button>
    </div>
  );
}

function Choices({ item, say }: { item: Extract<SpecItem, { kind: 'choice' }>; say: ItemDetailsProps['say'] }) {
  const read = (text: string) =>
    text
      .split(';')
      .map((option) => option.trimStart())
      .filter((option, index, all) => option !== '' || index === all.length - 1);
  return (
    <Labelled label="Choices, parted by semicolons; none for any words">
      <PlainInput
        label={`Choices for ${item.label}`}
        value={item.options.join('; ')}
        say={(text) => say({ ...item, options: text.trim() === '' ? [] : read(text) })}
      />
    </Labelled>
  );
}
