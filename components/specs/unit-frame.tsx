'use client';

import { createContext, useContext, useState, type ChangeEvent, type ReactNode } from 'react';
import { Segmented } from '@/components/ui/segmented';
import type { ShownUnit } from '@/lib/craft/measure';
import { shownUnitFrom, UNIT_COOKIE } from '@/lib/specs/shown-unit';

const UnitContext = createContext<{ unit: ShownUnit; choose: (unit: ShownUnit) => void } | null>(null);

const A_YEAR_S = 31_536_000;

/** Everything inside shows its lengths in the unit that this device chose; the cookie lets the server draw the same. */
export function UnitFrame({ initial, children }: { initial: ShownUnit; children: ReactNode }) {
  const [unit, setUnit] = useState(initial);
  const choose = (next: ShownUnit) => {
    setUnit(next);
    document.cookie = `${UNIT_COOKIE}=${next}; path=/; max-age=${A_YEAR_S}; samesite=lax`;
  };
  return (
    <UnitContext.Provider value={{ unit, choose }}>
      <div data-unit={unit} className="group/unit">
        {children}
      </div>
    </UnitContext.Provider>
  );
}

const options = [
  { value: 'in', label: 'in' },
  { value: 'fraction', label: '1/64' },
  { value: 'mm', label: 'mm' },
];

/** Inches, inches as fractions, or millimetres. */
export function UnitSwitch({ className }: { className?: string }) {
  const context = useContext(UnitContext);
  if (!context) return null;
  return (
    <Segmented
      legend="Show lengths in"
      isLegendHidden
      name="unit"
      options={options}
      value={context.unit}
      onChange={(event: ChangeEvent<HTMLInputElement>) => context.choose(shownUnitFrom(event.target.value))}
      className={className}
    />
  );
}
