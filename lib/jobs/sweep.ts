import { sweepUnusedDocuments } from '@/db/queries/documents';
import { dropOldBodies, sweepNews, sweepProviderEvents } from '@/db/queries/mail-sweep';
import { settleDoomed, sweepUnfinishedPhotos, unscopedDoomedObjects } from '@/db/queries/photos';
import { purgeExpiredSignIns } from '@/db/queries/sign-in';
import { deleteObject } from '@/lib/storage';

/** Deletes objects that nothing needs any more; what the store refuses is tried again later. */
export async function deleteDoomedObjects(nowMs: number): Promise<number> {
  const due = await unscopedDoomedObjects(nowMs, 200);
  const deleted: string[] = [];
  const failed: string[] = [];
  for (const { key } of due) {
    await deleteObject(key).then(
      () => deleted.push(key),
      () => failed.push(key),
    );
  }
  if (due.length > 0) await settleDoomed(deleted, failed, nowMs);
  return deleted.length;
}

/** What time has made useless: uploads that never finished, dead links, ended sessions, doomed objects, old mail. */
export async function sweep(nowMs: number): Promise<void> {
  while ((await sweepUnfinishedPhotos(nowMs)) > 0);
  while ((await sweepUnusedDocuments(nowMs)) > 0);
  await purgeExpiredSignIns(nowMs);
  while ((await deleteDoomedObjects(nowMs)) > 0);
  while ((await sweepNews(nowMs)) > 0);
  while ((await sweepProviderEvents(nowMs)) > 0);
  while ((await dropOldBodies(nowMs)) > 0);
}
