import { StringBalance } from './string-balance';
import { stringBalance } from '@/lib/craft/string-balance';
import { stringPlanOf, tensionBandOf } from '@/lib/specs/board';
import type { SpecDocument } from '@/lib/specs/document';

/** How the set of a spec pulls, or what is missing to tell. */
export function SpecStrings({ document }: { document: SpecDocument }) {
  const plan = stringPlanOf(document);
  const balance = plan.ok ? stringBalance(plan.value, tensionBandOf(document)) : plan;
  if (!balance.ok) return <p className="text-soft">{balance.message}</p>;
  return <StringBalance balance={balance.balance} />;
}
