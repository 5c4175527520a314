import { clsx } from 'clsx';
import type { FieldChange, SpecChange } from '@/lib/specs/diff';
import { byGroup, groupName } from '@/lib/specs/groups';

const kindWords = { added: 'new', removed: 'taken out', changed: 'changed' };

/** What one side says differently from the other, by group: how it was said before, and how now. */
export function SpecChanges({ changes, from, to }: { changes: SpecChange[]; from: string; to: string }) {
  if (changes.length === 0)
    return (
      <p className="text-soft" role="status">
        {from === to ? 'Choose two different ones to compare.' : `Nothing differs between ${from} and ${to}.`}
      </p>
    );
  return (
    <div className="grid gap-6">
      <p className="text-soft">
        {changes.length === 1 ? 'One item differs' : `${changes.length} items differ`} from {from} to {to}.
      </p>
      {byGroup(changes).map(({ group, items }) => (
        <section key={group} aria-label={groupName(group)}>
          <h3 className="text-lg">{groupName(group)}</h3>
          <ul role="list" className="mt-2 border-t border-line">
            {items.map((change) => (
              <li key={change.key} className="grid gap-x-8 gap-y-1 border-b border-line py-3 md:grid-cols-[16rem_1fr]">
                <p className="font-semibold break-words">
                  {change.label}
                  <span
                    className={clsx('block text-sm font-normal', change.kind === 'removed' ? 'text-late' : 'text-soft')}
                  >
                    {kindWords[change.kind]}
                  </span>
                </p>
                <dl className="grid gap-1">
                  {fieldsShown(change).map((field) => (
                    <Field key={field.name} field={field} />
                  ))}
                </dl>
              </li>
            ))}
          </ul>
        </section>
      ))}
    </div>
  );
}

/** Of what is new or gone, what it is says enough; its name stands beside it. */
function fieldsShown({ kind, fields }: SpecChange): FieldChange[] {
  return kind === 'changed' ? fields : fields.filter(({ name }) => ['value', 'tolerance', 'drawing'].includes(name));
}

function Field({ field: { name, before, after } }: { field: FieldChange }) {
  return (
    <div className="flex flex-wrap items-baseline gap-x-3">
      <dt className={name === 'value' ? 'sr-only' : 'text-sm text-soft'}>{name}</dt>
      {before !== null && (
        <dd className="break-words text-soft line-through decoration-1">
          <span className="sr-only">before: </span>
          {before}
        </dd>
      )}
      {after !== null && (
        <dd className="font-semibold break-words">
          <span className="sr-only">now: </span>
          {after}
        </dd>
      )}
      {after === null && <dd className="text-sm text-soft">no longer said</dd>}
    </div>
  );
}
