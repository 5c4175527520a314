import { type PictureOrder, take } from './shot';
import { type PictureKind, pictureList } from './list';

export type { BodyKind } from './bodies';
export type { PictureOrder } from './shot';
export type { PictureKind, StageKey } from './list';
export type { WoodTone } from './wood';

/** Every picture that can be drawn, in the order a guitar is made. */
export const pictureKinds: readonly Omit<PictureKind, 'subject'>[] = pictureList.map(
  ({ kind, stage, caption, alt }) => ({ kind, stage, caption, alt }),
);

/**
 * Draws one workshop picture as a JPEG of 1600 x 1200 or 1200 x 1600 without metadata.
 * The same order gives the same bytes.
 * @throws RangeError when no picture is called `kind`
 */
export async function drawPicture(kind: string, order: PictureOrder): Promise<Buffer> {
  const found = pictureList.find((entry) => entry.kind === kind);
  if (!found) throw new RangeError(`There is no picture called ${kind}.`);
  return take(found.subject, order);
}
