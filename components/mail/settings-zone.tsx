import { clsx } from 'clsx';
import { useId } from 'react';
import { controlClass, controlSizes, Field, fieldAria } from '@/components/ui/field';
import type { ZoneGroup } from '@/lib/zones';

type ZoneSelectProps = { zones: ZoneGroup[]; chosen: string; error?: string };

/** Where somebody is, by area and place. */
export function ZoneSelect({ zones, chosen, error }: ZoneSelectProps) {
  const id = useId();
  const hint = 'Every date and hour on these pages is told by the clock of this place.';
  return (
    <Field id={id} label="Where you are" hint={hint} error={error}>
      <select
        key={chosen}
        name="zone"
        defaultValue={chosen}
        {...fieldAria(id, { hint, error })}
        className={clsx(controlClass, controlSizes.normal)}
      >
        {zones.map(({ area, places }) => (
          <optgroup key={area} label={area}>
            {places.map(({ value, label }) => (
              <option key={value} value={value}>
                {label}
              </option>
            ))}
          </optgroup>
        ))}
      </select>
    </Field>
  );
}
