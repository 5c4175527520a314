import Link from 'next/link';
import { ruleWords } from '@/components/people/person-words';
import type { RuleRow } from '@/db/queries/access-review';

type Standing = { orderNumber: string; standing: 'owner' | 'companion' };

type PlaceListProps = {
  standings: { open: Standing[]; heldCount: number };
  rules: RuleRow[];
  isStaff: boolean;
  /** Whether there is nothing above this either. */
  isEmpty: boolean;
};

/** What somebody reaches other than by being assigned: their own builds, those they look on at, and rules. */
export function PlaceList({ standings: { open, heldCount }, rules, isStaff, isEmpty }: PlaceListProps) {
  const isNothing = isEmpty && open.length + heldCount + rules.length === 0;
  if (isNothing) return <p className="text-soft">No build at all{isStaff && ' until they are assigned to one'}.</p>;
  return (
    <ul role="list" className="grid gap-2 empty:hidden">
      {open.map(({ orderNumber, standing }) => (
        <li key={orderNumber}>
          {standing === 'owner' ? 'Owns' : 'Looks on at'}{' '}
          <Link
            prefetch={false}
            href={`/access/builds/${orderNumber}`}
            className="narrow font-semibold text-finish-deep hover:underline"
          >
            {orderNumber}
          </Link>
        </li>
      ))}
      {heldCount > 0 && (
        <li>
          {heldCount === 1 ? 'One build' : `${heldCount} builds`} on the client side held from view. Which, and whose,
          is kept apart until the hold ends.
        </li>
      )}
      {rules.map((rule) => (
        <li key={rule.id}>
          By rule: {ruleWords(rule)}. <span className="text-soft">Never one that is held from view.</span>
        </li>
      ))}
    </ul>
  );
}
