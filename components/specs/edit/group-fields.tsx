import { ItemRow } from './item-row';
import type { useSaid } from './use-said';
import { SectionHeading } from '@/components/ui/section-heading';
import type { CanChange } from '@/lib/specs/can-change';
import type { SpecGroup, SpecItem } from '@/lib/specs/document';
import { groupName } from '@/lib/specs/groups';
import { knownItems } from '@/lib/specs/known-items';
import { secondScale } from '@/lib/specs/new-item';

type GroupFieldsProps = {
  group: SpecGroup;
  items: SpecItem[];
  canChange: Readonly<Record<string, CanChange>>;
  saidOf: ReturnType<typeof useSaid>;
  say: (item: SpecItem) => void;
  takeOut: (...keys: string[]) => void;
  add: (items: SpecItem[], behindKey?: string) => void;
};

/** The items of one group; the fingerboard can have one scale or two. */
export function GroupFields({ group, items, canChange, saidOf, say, takeOut, add }: GroupFieldsProps) {
  const scale = items.find(({ key }) => key === knownItems.scaleLength);
  const isFrozen = scale !== undefined && canChange[scale.key]?.state === 'frozen';
  return (
    // Groups off the screen are neither laid out nor painted, so that a long spec stays quick to type in.
    <section
      aria-labelledby={`edit-${group}`}
      className="[contain-intrinsic-size:auto_40rem] [content-visibility:auto]"
    >
      <SectionHeading
        id={`edit-${group}`}
        action={scale && !isFrozen && <ScaleButton items={items} scale={scale} takeOut={takeOut} add={add} />}
      >
        {groupName(group)}
      </SectionHeading>
      <ul role="list" className="mt-2">
        {items.map((item) => (
          <ItemRow
            key={item.key}
            item={item}
            canChange={canChange[item.key]}
            say={say}
            takeOut={takeOut}
            {...saidOf(item)}
          />
        ))}
      </ul>
    </section>
  );
}

type ScaleButtonProps = Pick<GroupFieldsProps, 'items' | 'takeOut' | 'add'> & { scale: SpecItem };

function ScaleButton({ items, scale, takeOut, add }: ScaleButtonProps) {
  const isMultiscale = items.some(({ key }) => key === knownItems.bassScaleLength);
  const change = () =>
    isMultiscale
      ? takeOut(knownItems.bassScaleLength, knownItems.perpendicularFret)
      : add(secondScale(scale), scale.key);
  return (
    <button type="button" onClick={change} className="min-h-11 font-semibold text-finish-deep hover:underline">
      {isMultiscale ? 'Go back to one scale' : 'Use two scales'}
    </button>
  );
}
