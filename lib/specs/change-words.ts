type Change = { itemKey: string; label: string; wish: string; priceCents: number; extraDays: number };

/** What stands under the signature of a change: the wish in the owner's words, and what it costs. */
export const changeContent = (change: Change) => change;

export const changeTitle = (label: string) => `Change: ${label}`;

const money = new Intl.NumberFormat('en-US', { style: 'currency', currency: 'USD' });

/** `$180.00 and 6 working days`; says so where there is no price or no delay. */
export function offerWords(priceCents: number, extraDays: number): string {
  const price = priceCents === 0 ? 'no extra price' : money.format(priceCents / 100);
  const days = extraDays === 0 ? 'no extra days' : `${extraDays} working ${extraDays === 1 ? 'day' : 'days'} more`;
  return `${price}, ${days}`;
}
