type Leaving = {
  readyAt: number | null;
  shippedAt: number | null;
  shippedBy: string | null;
  deliveredAt: number | null;
};

/** How far a finished build has got, as its people read it; null while it is being built. */
export function leavingWords(
  { readyAt, shippedAt, shippedBy, deliveredAt }: Leaving,
  day: (ms: number) => string,
): string | null {
  if (deliveredAt !== null) return `Delivered on ${day(deliveredAt)}`;
  if (shippedAt !== null) return `Shipped with ${shippedBy ?? 'a carrier'} on ${day(shippedAt)}`;
  return readyAt === null ? null : `Ready since ${day(readyAt)}: the final check has passed`;
}
