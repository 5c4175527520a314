import Link from 'next/link';
import { finishKey } from '@/components/builds/finish-style';
import type { BuildRow } from '@/db/queries/builds';

/** The builds somebody may post to, each a row large enough for a glove. */
export function BenchBuilds({ builds }: { builds: BuildRow[] }) {
  return (
    <ul role="list" className="border-t-2 border-ink bg-sheet">
      {builds.map((build) => (
        <li key={build.orderNumber} data-finish={finishKey(build.finishHex)} className="border-b border-line">
          <Link
            href={`/bench/${build.orderNumber}`}
            className="grid min-h-18 grid-cols-[auto_minmax(0,1fr)_auto] items-center gap-x-4 px-3 py-3 -outline-offset-2 hover:bg-tint"
          >
            <FinishDot />
            <span className="min-w-0">
              <span className="block text-lg font-semibold">
                <span className="narrow">{build.orderNumber}</span> <bdi>{build.instrument}</bdi>
              </span>
              <span className="block text-soft">{stageWords(build)}</span>
            </span>
            <span className="narrow text-soft">{build.rack}</span>
          </Link>
        </li>
      ))}
    </ul>
  );
}

function stageWords({ stageName, stagesDone, stageCount, deliveredAt }: BuildRow): string {
  if (deliveredAt !== null) return 'Delivered';
  if (stageName) return stageName;
  return stagesDone === stageCount ? 'All stages finished' : 'Not begun';
}

function FinishDot() {
  return (
    <svg width="28" height="28" aria-hidden="true" focusable="false">
      <circle cx="14" cy="14" r="13" className="fill-finish stroke-edge" />
      <circle cx="10" cy="9.5" r="4" fill="#ffffff" opacity="0.35" />
    </svg>
  );
}
