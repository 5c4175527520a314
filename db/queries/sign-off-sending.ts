import { documentOfPhoto, nameDocument } from './documents';
import { askForSignOff } from './sign-off-asking';
import { requireCan } from './standing';
import { write } from '../client';
import type { NewSignOff } from '@/lib/validation/sign-offs';
import type { Viewer } from '@/lib/viewer';

/**
 * Puts a drawing or a sample before the owner of a build. `photoSha256` is that of the picture they will be shown, when
 * it is a photo.
 * @throws OutOfReach, Denied, or BadInput with a sentence a field
 */
export function sendForSignature(
  viewer: Viewer,
  wish: NewSignOff,
  photoSha256: string | null,
  nowMs: number,
): Promise<{ id: string; orderNumber: string }> {
  return write(async (tx) => {
    const build = await requireCan(viewer, 'sign_off.ask', wish.orderNumber, tx);
    const { kind, title, message, dueOn, blocksStageKey } = wish;
    const itemKey = wish.itemKey ?? null;
    const named = { kind, title, itemKey };
    let documentId = wish.documentId;
    let contentHash = photoSha256;
    if (documentId !== null) contentHash = await nameDocument(tx, build.id, documentId, named);
    else if (wish.photoId !== null && photoSha256 !== null)
      documentId = await documentOfPhoto(tx, viewer, build.id, { id: wish.photoId, sha256: photoSha256 }, named, nowMs);
    if (documentId === null || contentHash === null) throw new RangeError('neither a PDF nor a photo to sign');
    const subject = { kind, documentId, ...(itemKey ? { itemKey } : {}) };
    const replacesId = wish.replacesId ?? undefined;
    const ask = { ...subject, title, message, dueOn, blocksStageKey, contentHash, replacesId };
    return { id: await askForSignOff(tx, viewer, build, ask, nowMs), orderNumber: build.orderNumber };
  });
}
