'use client';

import Link from 'next/link';
import { useEffect, useState } from 'react';
import { openDrafts } from '@/lib/drafts';

type Waiting = { orderNumber: string; isWanted: boolean };

/** The entries this phone keeps for this viewer, so that none is forgotten. */
export function WaitingDrafts({ viewerId }: { viewerId: string }) {
  const [waiting, setWaiting] = useState<Waiting[]>([]);
  useEffect(() => {
    let isHere = true;
    void listDrafts(viewerId).then((found) => {
      if (isHere) setWaiting(found);
    });
    return () => void (isHere = false);
  }, [viewerId]);
  if (waiting.length === 0) return null;
  return (
    <ul role="list" aria-label="Kept on this phone" className="grid bg-brass-wash">
      {waiting.map(({ orderNumber, isWanted }) => (
        <li key={orderNumber}>
          <Link href={`/bench/${orderNumber}`} className="flex min-h-12 items-center px-3 py-2 -outline-offset-2">
            <span>
              <span className="narrow font-semibold">{orderNumber}</span>{' '}
              {isWanted ? 'An entry waits to be sent; open it and it goes.' : 'A draft is kept on this phone.'}
            </span>
          </Link>
        </li>
      ))}
    </ul>
  );
}

/** Where the browser keeps nothing there is nothing to list. */
const listDrafts = async (viewerId: string): Promise<Waiting[]> => {
  try {
    return await (await openDrafts(viewerId)).list();
  } catch {
    return [];
  }
};
