import AxeBuilder from '@axe-core/playwright';
import type { Page } from '@playwright/test';

/** What axe finds serious or worse on the page as it stands, in words; `exclude` leaves a part out. */
export async function graveFindings(page: Page, { exclude }: { exclude?: string } = {}) {
  // No page of ours holds a frame of another site; without one, axe's own mode for that opens a window a visit for nothing.
  const axe = new AxeBuilder({ page }).setLegacyMode();
  if (exclude) axe.exclude(exclude);
  const { violations } = await axe.analyze();
  return violations
    .filter(({ impact }) => impact === 'serious' || impact === 'critical')
    .map(({ id, nodes }) => `${id}: ${nodes.map((node) => node.target.join(' ')).join(', ')}`);
}
