import { drawPicture, pictureKinds, type BodyKind, type StageKey } from './pictures';
import type { finishes } from './shop-floor';
import type { ReadyPhoto } from '../queries/photos';
import { storePhoto } from '@/lib/jobs/photo-pipeline';
import { processPhoto } from '@/lib/photos/process-photo';

export type Finish = (typeof finishes)[number];

export type LibraryPhoto = ReadyPhoto & { stage: StageKey; alt: string; sizeBytes: number };

/** Stages from which on a picture shows the build's own colour. */
const coloured: readonly StageKey[] = ['colour-clear', 'sand-buff', 'hardware-setup', 'final-check'];

/**
 * Draws a picture once for all builds that may share it, sends it through the product's own photo pipeline, and
 * remembers where it lies. Bare wood is shared by all builds; colour by all builds of one finish.
 */
export class PhotoLibrary {
  private readonly made = new Map<string, Promise<LibraryPhoto>>();

  constructor(private readonly drawnWidthPx: number) {}

  /** At most `count` pictures of a stage for an instrument like this, beginning with the `from`-th. */
  async ofStage(
    stage: StageKey,
    look: { finish: Finish; body: BodyKind },
    from: number,
    count: number,
  ): Promise<LibraryPhoto[]> {
    const kinds = pictureKinds.filter((picture) => picture.stage === stage);
    const chosen = kinds.map((_, index) => kinds[(from + index) % kinds.length]).slice(0, count);
    const photos: LibraryPhoto[] = [];
    for (const picture of chosen) if (picture) photos.push(await this.photo(picture, look));
    return photos;
  }

  get count(): number {
    return this.made.size;
  }

  private photo(
    picture: (typeof pictureKinds)[number],
    { finish, body }: { finish: Finish; body: BodyKind },
  ): Promise<LibraryPhoto> {
    const key = coloured.includes(picture.stage) ? `${picture.kind} ${finish.name}` : picture.kind;
    const known =
      this.made.get(key) ?? make(picture, { finish, body, seed: this.made.size + 1, widthPx: this.drawnWidthPx });
    this.made.set(key, known);
    return known;
  }
}

type Order = { finish: Finish; body: BodyKind; seed: number; widthPx: number };

async function make(
  { kind, stage, alt }: (typeof pictureKinds)[number],
  { finish, ...order }: Order,
): Promise<LibraryPhoto> {
  const bytes = await drawPicture(kind, { finish, woodTone: finish.wood, ...order });
  const made = await processPhoto({ bytes, contentType: 'image/jpeg', sizeBytes: bytes.length });
  if (!made.ok) throw new Error(`the drawing ${kind} did not pass the pipeline: ${made.detail}`);
  return { stage, alt, sizeBytes: bytes.length, ...(await storePhoto(bytes, 'image/jpeg', made)) };
}
