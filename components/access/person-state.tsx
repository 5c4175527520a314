type PersonState = { verifiedAt: number | null; disabledAt: number | null };

/** Whether somebody has come in yet, or may no longer. */
export function PersonStateWord({ verifiedAt, disabledAt }: PersonState) {
  if (disabledAt !== null) return <span className="font-semibold text-late">closed</span>;
  if (verifiedAt === null) return <span className="font-semibold text-brass-deep">invited</span>;
  return <span>active</span>;
}
