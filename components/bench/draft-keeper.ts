import { toKept } from './kept-draft';
import type { Draft } from './draft-state';
import type { DraftStore, KeptPhoto } from '@/lib/drafts';

const REST_MS = 300;

export type DraftKeeper = ReturnType<typeof createDraftKeeper>;

/**
 * Writes one build's draft down, shortly after each change. `store` is null where the browser keeps nothing.
 * `onTrouble` is told when something could not be kept.
 */
export function createDraftKeeper(store: DraftStore | null, orderNumber: string, onTrouble: () => void) {
  let waiting: Draft | null = null;
  let timer: ReturnType<typeof setTimeout> | undefined;

  async function trying(work: (open: DraftStore) => Promise<void>): Promise<void> {
    try {
      if (store) await work(store);
      else onTrouble();
    } catch {
      onTrouble();
    }
  }

  async function keepNow(draft: Draft): Promise<void> {
    forget();
    await trying((open) => open.keep(orderNumber, toKept(draft)));
  }

  function forget(): void {
    clearTimeout(timer);
    waiting = null;
  }

  return {
    keepNow,
    keepSoon(draft: Draft): void {
      forget();
      waiting = draft;
      timer = setTimeout(() => void keepNow(draft), REST_MS);
    },
    /** What has not been written yet is written at once: the page may be about to go. */
    flush(): void {
      if (waiting) void keepNow(waiting);
    },
    keepPhoto: (photo: KeptPhoto) => trying((open) => open.keepPhoto(orderNumber, photo)),
    dropPhoto: (uploadKey: string) => trying((open) => open.dropPhoto(orderNumber, uploadKey)),
    async clear(): Promise<void> {
      forget();
      await trying((open) => open.clear(orderNumber));
    },
  };
}
