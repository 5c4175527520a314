import { useState } from 'react';
import { Labelled, PlainInput, PlainSelect } from './plain-fields';
import { Button } from '@/components/ui/button';
import { specGroups, type SpecItem } from '@/lib/specs/document';
import { groupName } from '@/lib/specs/groups';
import { blankItem, itemKinds, keyFor } from '@/lib/specs/new-item';

const kindWords = { measure: 'A measure', choice: 'Words or a choice', material: 'A material', look: 'A look' };
const kinds = itemKinds.map((kind) => ({ value: kind, label: kindWords[kind] }));
const groups = specGroups.map((group) => ({ value: group, label: groupName(group) }));

/** One more item, at the end of its group. */
export function AddItem({ takenKeys, add }: { takenKeys: () => ReadonlySet<string>; add: (item: SpecItem) => void }) {
  const [label, setLabel] = useState('');
  const [kind, setKind] = useState<string>('measure');
  const [group, setGroup] = useState<string>('body');
  const addIt = () => {
    const [chosenKind, chosenGroup] = [itemKinds.find((one) => one === kind), specGroups.find((one) => one === group)];
    if (!chosenKind || !chosenGroup || label.trim() === '') return;
    add(blankItem(chosenKind, keyFor(label, takenKeys()), chosenGroup, label.trim()));
    setLabel('');
  };
  return (
    <div className="grid items-end gap-3 sm:grid-cols-[minmax(0,1fr)_11rem_12rem_auto]">
      <Labelled label="Add an item">
        <PlainInput label="Name of the new item" value={label} say={setLabel} />
      </Labelled>
      <PlainSelect label="Kind of the new item" value={kind} say={setKind} options={kinds} />
      <PlainSelect label="Group of the new item" value={group} say={setGroup} options={groups} />
      <Button variant="quiet" onClick={addIt} disabled={label.trim() === ''}>
        Add
      </Button>
    </div>
  );
}
