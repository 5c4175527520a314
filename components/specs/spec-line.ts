import { drawingOf, type Drawing } from '@/lib/specs/drawings';
import type { ProofLine } from '@/lib/specs/proof';
import { itemWords, allowedWords, measureIn, type MaterialNames } from '@/lib/specs/item-words';
import { canChange, type CanChange } from '@/lib/specs/can-change';
import { inEachUnit, type InEachUnit } from '@/lib/specs/shown-unit';
import type { ShownUnit } from '@/lib/craft/measure';
import { shortDay } from '@/lib/date-words';
import type { SpecGroup, SpecItem } from '@/lib/specs/document';

/** One item as a row of the spec page shows it. */
export type SpecLine = {
  key: string;
  group: SpecGroup;
  label: string;
  signed: InEachUnit;
  allowed: string | null;
  /** The drawing or sample it is to look like; null where there is none, or none this reader may open. */
  drawing: Drawing | null;
  state: ProofLine['state'];
  measured: InEachUnit | null;
  within: string | null;
  proofs: { href: string; words: string }[];
  /** Where proof is expected, "at Hardware & set-up"; null where no stage was named. */
  expectedAt: string | null;
  waitsFor: string | null;
  concededBy: string | null;
  canChange: CanChange;
  needsPapers: boolean;
};

type Around = Parameters<typeof canChange>[1] & {
  orderNumber: string;
  materials: MaterialNames;
  drawings: readonly Drawing[];
  papersKeys: ReadonlySet<string>;
  isDelivered: boolean;
};

/** What was measured carries its unit, so that it can be said in another; a count has none. */
const measuredIn = (measured: string, item: SpecItem, show: ShownUnit) =>
  item.kind === 'measure' ? measureIn({ text: measured, unit: item.aim.unit }, show) : measured;

/** An item that nobody has to prove yet: its version is not signed. */
export const unproven = (item: SpecItem) => ({
  item,
  state: 'open' as const,
  measured: null,
  withinWords: null,
  proofs: [],
  waitsForSignOff: null,
  concession: null,
});

type Judged = Omit<ProofLine, 'signed'>;

export function specLine(line: Judged, around: Around): SpecLine {
  const { item, measured, concession } = line;
  const { materials, stages, zone } = around;
  const stageName = stages.find(({ key }) => key === item.provenAt)?.name;
  return {
    key: item.key,
    group: item.group,
    label: item.label,
    signed: inEachUnit((show) => itemWords(item, show, materials)),
    allowed: allowedWords(item),
    drawing: drawingOf(item, around.drawings),
    state: line.state,
    measured: measured === null ? null : inEachUnit((show) => measuredIn(measured, item, show)),
    within: line.withinWords,
    proofs: line.proofs.map(({ entryId, datedAt, stageName }) => ({
      href: `/builds/${around.orderNumber}#entry-${entryId}`,
      words: `${shortDay(datedAt, zone)}, ${stageName}`,
    })),
    expectedAt: stageName ? `at ${stageName}` : null,
    waitsFor: line.waitsForSignOff,
    concededBy: concession && `let pass by ${concession.signedName}, ${shortDay(concession.signedAt, zone)}`,
    canChange: canChange(item, around, around.isDelivered),
    needsPapers: item.kind === 'material' && item.materialKey !== null && around.papersKeys.has(item.materialKey),
  };
}
