import Link from 'next/link';
import type { ReactNode } from 'react';

type BenchHeaderProps = { orderNumber: string; rack?: string | null; instrument: string; children?: ReactNode };

/** Which instrument is on the bench, and the way back to its diary. A draft stays kept. */
export function BenchHeader({ orderNumber, rack, instrument, children }: BenchHeaderProps) {
  return (
    <header data-sub-nav="alone" className="border-t border-night-line bg-night text-on-night">
      <div className="mx-auto max-w-2xl px-4.5 pt-1.5 pb-5">
        <div className="flex items-center justify-between gap-4">
          <p className="narrow font-semibold text-on-night-soft">
            {orderNumber}
            {rack && ` · ${rack}`}
          </p>
          <Link
            href={`/builds/${orderNumber}`}
            className="-mr-2 flex min-h-12 items-center px-2 text-on-night-soft outline-offset-0 focus-visible:outline-on-night"
          >
            Cancel
          </Link>
        </div>
        <h1 className="text-2xl">
          <bdi>{instrument}</bdi>
        </h1>
        {children && <p className="mt-1 text-on-night-soft">{children}</p>}
      </div>
    </header>
  );
}
