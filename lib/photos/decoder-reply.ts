import { z } from 'zod';
import { MAX_MAIL_BYTES, MAX_PHOTO_BYTES, MAX_BLUR_URL_CHARS, MAX_SIDE_PX, VARIANT_WIDTHS_PX } from './limits';
import { PHOTO_REFUSAL_CODES } from './refusals';

const widthPx = z
  .int()
  .min(1)
  .max(Math.max(...VARIANT_WIDTHS_PX));
const heightPx = z.int().min(1).max(MAX_SIDE_PX);
const fileOf = (maxBytes: number) => z.instanceof(Uint8Array).refine((bytes) => bytes.length <= maxBytes);

const madePhoto = z.strictObject({
  ok: z.literal(true),
  /** Size of the largest variant, upright. */
  widthPx,
  heightPx,
  /** WebP, narrowest first, never wider than the photo itself. */
  variants: z
    .array(z.strictObject({ widthPx, heightPx, bytes: fileOf(MAX_PHOTO_BYTES) }))
    .min(1)
    .max(VARIANT_WIDTHS_PX.length),
  mailJpeg: fileOf(MAX_MAIL_BYTES),
  blurDataUrl: z
    .string()
    .max(MAX_BLUR_URL_CHARS)
    .regex(/^data:image\/webp;base64,[A-Za-z0-9+/]+=*$/),
});

const refusedPhoto = z.strictObject({ ok: z.literal(false), code: z.enum(PHOTO_REFUSAL_CODES), detail: z.string() });

/** A decoder that a hostile picture took over could answer anything, so its parent checks every reply against this. */
export const decoderReply = z.discriminatedUnion('ok', [madePhoto, refusedPhoto]);
export type DecoderReply = z.infer<typeof decoderReply>;
export type MadePhoto = z.infer<typeof madePhoto>;
