import { claimDueReaders, listUntold, writeDigests, type DueReader } from '@/db/queries/digests';
import { unscopedUntoldNews } from '@/db/queries/news';

const LEASE_MS = 60_000;
const READERS_A_TURN = 50;

/** Writes the digest of everybody whose time has come to the outbox. @returns how many readers were looked at */
export async function writeDueDigests(owner: string, now: () => number): Promise<number> {
  for (let readers = 0; ;) {
    const due = await claimDueReaders(owner, now(), LEASE_MS, READERS_A_TURN);
    if (due.length === 0) return readers;
    await writeDigests(owner, await gather(due, now()), now());
    readers += due.length;
    await new Promise(setImmediate);
  }
}

async function gather(due: DueReader[], nowMs: number) {
  const ids = due.map(({ viewer }) => viewer.id);
  const news = await unscopedUntoldNews(ids, nowMs);
  return Promise.all(
    due.map(async (reader) => {
      const untold = await listUntold(reader);
      const entryIds = untold.map(({ entryId }) => entryId);
      return { due: reader, entryIds, newsIds: news.get(reader.viewer.id) ?? [] };
    }),
  );
}
