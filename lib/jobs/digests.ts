import { claimDueReader, listUntold, writeDigest } from '@/db/queries/mail-settings';

const LEASE_MS = 60_000;

/** Writes the digest of everybody whose time has come to the outbox. @returns how many readers were looked at */
export async function writeDueDigests(owner: string, now: () => number): Promise<number> {
  for (let readers = 0; ; readers++) {
    const due = await claimDueReader(owner, now(), LEASE_MS);
    if (!due) return readers;
    const untold = await listUntold(due);
    await writeDigest(
      due,
      untold.map(({ entryId }) => entryId),
      owner,
      now(),
    );
    await new Promise(setImmediate);
  }
}
