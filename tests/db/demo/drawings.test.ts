import { expect, test } from 'vitest';
import { drawDrawing } from '@/db/demo/drawings';
import { checkPdf } from '@/lib/documents/pdf-check';

test.each(['headstock', 'inlay', 'controls'] as const)(
  'the %s of the demo world passes the check that a rep’s own PDF goes through, and differs from one revision to the next',
  async (kind) => {
    const notes = { orderNumber: 'Q-2417', title: 'Logo (shell), drawing \\1)', instrument: 'Nightjar — baritone' };
    const [first, second] = [drawDrawing(kind, 1, notes), drawDrawing(kind, 2, notes)];
    expect(await checkPdf(first)).toEqual({ ok: true, pages: 1 });
    expect(second.equals(first)).toBe(false);
  },
);
