import Link from 'next/link';
import type { ReactNode } from 'react';

type SpecFrameProps = {
  orderNumber: string;
  title: string;
  /** The line above the title. */
  over: ReactNode;
  intro?: ReactNode;
  action?: ReactNode;
  children: ReactNode;
};

/** A page below the spec, with the way back. */
export function SpecFrame({ orderNumber, title, over, intro, action, children }: SpecFrameProps) {
  return (
    <div className="mx-auto grid max-w-[82rem] grid-cols-[minmax(0,1fr)] gap-8 px-4.5 py-8 md:px-10 md:py-10">
      <div className="flex flex-wrap items-end justify-between gap-x-8 gap-y-4">
        <div>
          <Link
            href={`/builds/${orderNumber}/spec`}
            className="inline-flex min-h-11 items-center font-semibold text-finish-deep hover:underline"
          >
            Back to the spec
          </Link>
          <p className="narrow text-sm font-semibold text-soft">{over}</p>
          <h1 className="mt-1 text-3xl">{title}</h1>
          {intro && <div className="mt-2 max-w-2xl text-soft">{intro}</div>}
        </div>
        {action}
      </div>
      {children}
    </div>
  );
}
