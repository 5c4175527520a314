import type { ReadingPlan } from '@/lib/readings/plan';
import type { ReadFields } from '@/lib/readings/read-typed';
import type { ShownReading } from '@/lib/readings/reading';
import type { TypedReadings } from '@/lib/readings/typed';

/** What every group of fields is given. */
export type FieldsProps = {
  typed: TypedReadings;
  plan: ReadingPlan;
  read: ReadFields;
  /** Empty fields that the others need are pointed out. */
  isMissingSaid: boolean;
  onType: (change: Partial<TypedReadings>) => void;
};

/** What is said at one field. */
export function saidAt(field: string, { read, isMissingSaid }: Pick<FieldsProps, 'read' | 'isMissingSaid'>) {
  return { doubt: read.doubts[field], missing: isMissingSaid ? read.missing[field] : undefined };
}

export const shownOf = ({ shown }: ReadFields, kind: ShownReading['kind']) => shown.find((one) => one.kind === kind);
