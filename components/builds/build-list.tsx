import Link from 'next/link';
import { finishKey } from './finish-style';
import { NeckStrip } from './neck-track-strip';
import type { BuildRow } from '@/db/queries/builds';
import { shortDay } from '@/lib/date-words';

type BuildListProps = { builds: BuildRow[]; zone: string; nowMs: number };

/** Builds with their necks, one a row; the whole row leads into the diary. */
export function BuildList({ builds, zone, nowMs }: BuildListProps) {
  return (
    <ul role="list" className="border-t-2 border-ink bg-sheet">
      {builds.map((build) => (
        <li
          key={build.orderNumber}
          className="relative border-b border-line px-4 py-3 hover:bg-tint"
          data-finish={finishKey(build.finishHex)}
        >
          <div className="grid items-center gap-x-6 gap-y-2 md:grid-cols-[15rem_minmax(0,1fr)_13rem]">
            <div>
              <Link href={`/builds/${build.orderNumber}`} className="font-semibold after:absolute after:inset-0">
                <span className="narrow">{build.orderNumber}</span> <bdi>{build.instrument}</bdi>
              </Link>
              <p className="text-sm text-soft">
                {[build.ownerName && `for ${build.ownerName}`, build.finishName].filter(Boolean).join(' · ')}
              </p>
            </div>
            <NeckStrip stages={neckOf(build)} nowShare={0.5} finishHex={build.finishHex} className="h-6" />
            <p className="text-sm">
              <span className="block">{stageWords(build, zone)}</span>
              <Standing build={build} nowMs={nowMs} />
            </p>
          </div>
        </li>
      ))}
    </ul>
  );
}

function Standing({ build, nowMs }: { build: BuildRow; nowMs: number }) {
  if (build.heldUntilAt !== null && build.heldUntilAt > nowMs)
    return <span className="font-semibold text-brass-deep">held from view</span>;
  if (build.newCount > 0) return <span className="font-semibold text-finish-deep">{build.newCount} new</span>;
  return <span className="text-soft">{build.rack ?? ''}</span>;
}

function stageWords({ stageName, stageSince, deliveredAt }: BuildRow, zone: string): string {
  if (deliveredAt !== null) return `Delivered ${shortDay(deliveredAt, zone)}`;
  if (!stageName || stageSince === null) return 'Not begun';
  return `${stageName}, since ${shortDay(stageSince, zone)}`;
}

function neckOf({ stageCount, stagesDone, stageName }: BuildRow) {
  return Array.from({ length: stageCount }, (_, index) => ({
    name: index === stagesDone ? (stageName ?? `Stage ${index + 1}`) : `Stage ${index + 1}`,
    state:
      index < stagesDone
        ? ('done' as const)
        : index === stagesDone && stageName
          ? ('now' as const)
          : ('ahead' as const),
  }));
}
