import { clsx } from 'clsx';
import { ToleranceBar } from './tolerance-bar';
import type { ShownReading as Shown } from '@/lib/readings/reading';

/** A reading as it is read: the figures beside their tolerance, or what follows from them. */
export function ShownReading({ reading }: { reading: Shown }) {
  const { label, figures, words, standing, bar } = reading;
  const isOutside = standing === 'outside';
  return (
    <div className="min-w-0">
      <dt className="text-sm text-soft">{label}</dt>
      <dd className="grid gap-0.5">
        <span className="narrow text-lg leading-snug font-semibold break-words">{figures}</span>
        {bar ? (
          <ToleranceBar value={bar.value} unit="" band={{ low: bar.low, high: bar.high }} aim={bar.aim} words={words} />
        ) : (
          words && <span className={clsx('narrow', isOutside && 'text-late')}>{words}</span>
        )}
      </dd>
    </div>
  );
}
