import { StringBalance } from './string-balance';
import { StringTrial } from './string-trial';
import { stringBalance } from '@/lib/craft/string-balance';
import { stringPlanOf, tensionBandOf } from '@/lib/specs/board';
import type { SpecDocument } from '@/lib/specs/document';

/** How the set of a spec pulls, and how it would with another gauge on one string; or what is missing to tell. */
export function SpecStrings({ document }: { document: SpecDocument }) {
  const plan = stringPlanOf(document);
  if (!plan.ok) return <p className="text-soft">{plan.message}</p>;
  const balance = stringBalance(plan.value, tensionBandOf(document));
  if (!balance.ok) return <p className="text-soft">{balance.message}</p>;
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-5">
      <StringBalance balance={balance.balance} />
      <StringTrial plan={plan.value} strings={balance.balance.strings} />
    </div>
  );
}
