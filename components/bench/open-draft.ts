import { createDraftKeeper, type DraftKeeper } from './draft-keeper';
import type { Draft } from './draft-state';
import { blankDraft, fromKept } from './kept-draft';
import { openDrafts, type DraftStore } from '@/lib/drafts';

export type OpenedDraft = { draft: Draft; keeper: DraftKeeper };

/** The draft this phone keeps for a build, or a new one. Where nothing can be kept, writing goes on without. */
export async function openDraft(viewerId: string, orderNumber: string, onTrouble: () => void): Promise<OpenedDraft> {
  const store = await openStore(viewerId);
  const kept = await store?.find(orderNumber).catch(() => null);
  const freshKey = crypto.randomUUID();
  const draft = kept ? fromKept(kept, freshKey) : blankDraft(freshKey);
  return { draft, keeper: createDraftKeeper(store, orderNumber, onTrouble) };
}

async function openStore(viewerId: string): Promise<DraftStore | null> {
  try {
    return await openDrafts(viewerId);
  } catch {
    return null;
  }
}
