/**
 * Every sign-off of one thing, oldest first: the row itself, those it took the place of, and those that took its own.
 * Links that lead in a circle or nowhere end the chain.
 */
export function chainOf<Row extends { id: string; replacesId: string | null }>(rows: Row[], id: string): Row[] {
  const byId = new Map(rows.map((row) => [row.id, row]));
  const bySuccessor = new Map(rows.flatMap((row) => (row.replacesId ? [[row.replacesId, row] as const] : [])));
  const self = byId.get(id);
  if (!self) return [];
  const chain = [self];
  const seen = new Set([id]);
  for (let at: Row | undefined = byId.get(self.replacesId ?? ''); at && !seen.has(at.id);) {
    seen.add(at.id);
    chain.unshift(at);
    at = byId.get(at.replacesId ?? '');
  }
  for (let at = bySuccessor.get(id); at && !seen.has(at.id); at = bySuccessor.get(at.id)) {
    seen.add(at.id);
    chain.push(at);
  }
  return chain;
}
