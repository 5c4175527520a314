import type { ProofLine } from '@/lib/specs/proof';
import { itemWords, allowedWords, measureIn, type MaterialNames } from '@/lib/specs/item-words';
import { canChange, type CanChange } from '@/lib/specs/can-change';
import { inEachUnit, type InEachUnit } from '@/lib/specs/shown-unit';
import { shortDay } from '@/lib/date-words';
import type { SpecGroup, SpecItem } from '@/lib/specs/document';

/** One item as a row of the spec page shows it. */
export type SpecLine = {
  key: string;
  group: SpecGroup;
  label: string;
  signed: InEachUnit;
  allowed: string | null;
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
  papersKeys: ReadonlySet<string>;
  isDelivered: boolean;
};

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
    state: line.state,
    // What was measured carries its unit, so that it can be said in another.
    measured: measured === null ? null : inEachUnit((show) => measureIn({ text: measured, unit: 'in' }, show)),
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
