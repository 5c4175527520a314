import type { ReadingStand } from './readings/read-typed';
import type { TypedReadings } from './readings/typed';
import { openDB, type DBSchema, type IDBPDatabase } from 'idb';

/** An entry that is not in the diary yet, as this phone keeps it. `note` is read with `readNote`, whatever is in it. */
export type KeptDraft = {
  idempotencyKey: string;
  note: unknown;
  /** Null follows the stage of now. */
  stageId: string | null;
  startStage: boolean;
  audience: 'buyer' | 'shop';
  /** `wanted`: to be posted when that can be done. `sent`: it may have reached the shop already. */
  posting: 'no' | 'wanted' | 'sent';
  /** In the order of the entry. */
  photos: { uploadKey: string; alt: string; photoId?: string }[];
  /** A draft from before readings were taken has neither. */
  readings?: KeptReadings;
  proves?: string[];
};

/** `stand` is what the fields came to when they were last typed in. */
export type KeptReadings = { typed: TypedReadings; stand: ReadingStand | null };

export type KeptPhoto = { uploadKey: string; name: string; contentType: string; blob: Blob };

interface DraftSchema extends DBSchema {
  drafts: { key: [viewerId: string, orderNumber: string]; value: KeptDraft };
  photos: { key: [viewerId: string, orderNumber: string, uploadKey: string]; value: KeptPhoto };
}

export type DraftStore = Awaited<ReturnType<typeof openDrafts>>;

/**
 * The drafts of one viewer on this phone, one for each build. Those of anybody else are never read.
 * @throws DOMException where the browser keeps nothing; so does each write when the phone is full
 */
export async function openDrafts(viewerId: string) {
  const database = await openDB<DraftSchema>('flitchbook-bench', 1, {
    upgrade(fresh) {
      fresh.createObjectStore('drafts');
      fresh.createObjectStore('photos');
    },
  });
  return {
    find: (orderNumber: string) => findDraft(database, viewerId, orderNumber),
    /** Order numbers of the builds that a draft is kept for, and whether it is to be posted. */
    list: () => listDrafts(database, viewerId),
    async keep(orderNumber: string, draft: KeptDraft): Promise<void> {
      await database.put('drafts', draft, [viewerId, orderNumber]);
    },
    async keepPhoto(orderNumber: string, photo: KeptPhoto): Promise<void> {
      await database.put('photos', photo, [viewerId, orderNumber, photo.uploadKey]);
    },
    dropPhoto: (orderNumber: string, uploadKey: string) =>
      database.delete('photos', [viewerId, orderNumber, uploadKey]),
    async clear(orderNumber: string): Promise<void> {
      const both = database.transaction(['drafts', 'photos'], 'readwrite');
      await both.objectStore('drafts').delete([viewerId, orderNumber]);
      await both.objectStore('photos').delete(photosOf(viewerId, orderNumber));
      await both.done;
    },
  };
}

const photosOf = (viewerId: string, orderNumber: string) =>
  IDBKeyRange.bound([viewerId, orderNumber], [viewerId, orderNumber, []]);

/** A photo may have been kept and the draft not yet, if the page died in between: it is found all the same. */
async function findDraft(database: IDBPDatabase<DraftSchema>, viewerId: string, orderNumber: string) {
  const both = database.transaction(['drafts', 'photos']);
  const [draft, photos] = await Promise.all([
    both.objectStore('drafts').get([viewerId, orderNumber]),
    both.objectStore('photos').getAll(photosOf(viewerId, orderNumber)),
  ]);
  return draft || photos.length > 0 ? { draft, photos } : null;
}

async function listDrafts(database: IDBPDatabase<DraftSchema>, viewerId: string) {
  const own = IDBKeyRange.bound([viewerId], [viewerId, []]);
  const [keys, drafts] = await Promise.all([database.getAllKeys('drafts', own), database.getAll('drafts', own)]);
  return keys.map(([, orderNumber], index) => ({ orderNumber, isWanted: drafts[index]?.posting !== 'no' }));
}
