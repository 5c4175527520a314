'use client';

import { useRouter } from 'next/navigation';
import { useEffect } from 'react';
import type { DraftKeeper } from './draft-keeper';
import { Notice } from '@/components/ui/notice';

type PostedProps = { orderNumber: string; keeper: DraftKeeper; entryId: string; isHeld: boolean };

/** The entry is in the diary: the draft goes, and the diary opens at it. */
export function Posted({ orderNumber, keeper, entryId, isHeld }: PostedProps) {
  const router = useRouter();
  useEffect(() => {
    void keeper.clear().then(() => router.push(`/builds/${orderNumber}#entry-${entryId}`));
  }, [router, keeper, orderNumber, entryId]);
  return (
    <Notice tone="done" role="status" title={isHeld ? 'Posted. It waits for a rep’s release.' : 'Posted'}>
      The diary opens.
    </Notice>
  );
}
