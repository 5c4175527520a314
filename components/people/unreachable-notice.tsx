import { unreachableWords } from './unreachable-words';
import { Notice } from '@/components/ui/notice';
import type { UnreachableOwner } from '@/db/queries/contacts';

type UnreachableNoticeProps = { owners: UnreachableOwner[]; className?: string };

/** Tells a rep that what they write here does not reach the owner by mail. Nothing for an owner who is reached. */
export function UnreachableNotice({ owners, className }: UnreachableNoticeProps) {
  return owners.map(({ id, name, why }) => (
    <Notice key={id} tone="late" className={className}>
      <p className="font-semibold">
        <bdi>{name}</bdi> gets none of our mail
      </p>
      <p>{unreachableWords[why]} They still read everything when they sign in.</p>
    </Notice>
  ));
}
