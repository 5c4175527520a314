'use client';

import { createContext, useContext, useMemo, type ReactNode } from 'react';
import type { Option } from '@/components/ui/select';
import type { SpecSurroundings } from '@/lib/specs/check';
import type { Drawing } from '@/lib/specs/drawings';
import type { MaterialNames } from '@/lib/specs/item-words';

type Surroundings = SpecSurroundings & {
  stages: Option[];
  materials: Option[];
  materialNames: MaterialNames;
  drawings: Drawing[];
};

const Context = createContext<Surroundings | null>(null);

type SurroundingsProps = Pick<Surroundings, 'stages' | 'materials' | 'drawings'> & { children: ReactNode };

/** The stages, materials and drawings that every row chooses from, the same object for all of them. */
export function EditSurroundings({ stages, materials, drawings, children }: SurroundingsProps) {
  const value = useMemo(
    () => ({
      stages,
      materials,
      drawings,
      materialNames: Object.fromEntries(materials.map((one) => [one.value, one.label])),
      stageKeys: new Set(stages.map((one) => one.value)),
      materialKeys: new Set(materials.map((one) => one.value)),
      drawingIds: new Set(drawings.map(({ id }) => id)),
    }),
    [stages, materials, drawings],
  );
  return <Context.Provider value={value}>{children}</Context.Provider>;
}

/** @throws Error outside of `EditSurroundings` */
export function useSurroundings(): Surroundings {
  const value = useContext(Context);
  if (!value) throw new Error('a spec field outside of its form');
  return value;
}
