import { ShownReading } from './shown-reading';
import type { ShownReading as Shown } from '@/lib/readings/reading';

/** What the fields come to while they are typed in. */
export function LiveReading({ reading }: { reading: Shown | undefined }) {
  return (
    <div aria-live="polite" className="empty:hidden">
      {reading && (
        <dl className="rounded border-l-4 border-finish-deep bg-tint px-4 py-3">
          <ShownReading reading={reading} />
        </dl>
      )}
    </div>
  );
}
