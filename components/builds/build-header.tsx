import type { ReactNode } from 'react';
import { NeckTrack } from './neck-track';
import type { BuildHead, StageRow } from '@/db/queries/builds';
import { dayWords } from '@/lib/date-words';
import { leavingWords } from '@/lib/leaving-words';
import { neckStages, nowShare } from '@/lib/neck-stages';

type BuildHeaderProps = {
  build: BuildHead;
  stages: StageRow[];
  /** Stages that wait for the owner to sign. */
  blockedKeys?: readonly string[];
  ownerName?: string;
  zone: string;
  nowMs: number;
  /** When it will be ready. */
  children?: ReactNode;
};

/** What is being made, for whom, and how far it is. */
export function BuildHeader({ build, stages, blockedKeys, ownerName, zone, nowMs, children }: BuildHeaderProps) {
  const facts = [build.finishName, `${build.scaleLengthIn} in scale`, ownerName && `built for ${ownerName}`];
  const leaving = leavingWords(build, (ms) => dayWords(ms, zone, nowMs));
  return (
    <header className="border-b border-line bg-sheet">
      <div className="mx-auto grid max-w-[82rem] gap-6 px-4.5 pt-6 pb-5 md:px-10 md:pt-10 md:pb-8">
        <div>
          <p className="narrow text-sm font-semibold text-soft">Order {build.orderNumber}</p>
          <h1 className="mt-1 text-3xl md:text-4xl">
            <bdi>{build.instrument}</bdi>
          </h1>
          <p className="mt-2 flex gap-x-2 text-soft md:text-lg">
            <FinishDot />
            <span>{facts.filter(Boolean).join(' · ')}</span>
          </p>
          {leaving !== null && <p className="mt-2 font-semibold">{leaving}</p>}
          {build.heldUntilAt !== null && build.heldUntilAt > nowMs && (
            <p className="mt-2 font-semibold text-brass-deep">
              Held from view until {dayWords(build.heldUntilAt, zone, nowMs)}
            </p>
          )}
          {children}
        </div>
        <NeckTrack stages={neckStages(stages, zone, blockedKeys)} nowShare={nowShare(stages, nowMs)} />
      </div>
    </header>
  );
}

function FinishDot() {
  return (
    <svg width="18" height="18" aria-hidden="true" focusable="false" className="mt-1 shrink-0">
      <circle cx="9" cy="9" r="8.5" className="fill-finish stroke-edge" />
      <circle cx="6.5" cy="6" r="2.5" fill="#ffffff" opacity="0.35" />
    </svg>
  );
}
