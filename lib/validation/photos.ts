import { z } from 'zod';
import { MAX_PHOTO_BYTES, PHOTO_TYPES } from '@/lib/photos/limits';
import { cleanLine } from '@/lib/rich-text/names';

export const newPhoto = z.strictObject({
  /** The sender's own mark for this upload: the same one again means the same photo. */
  uploadKey: z.string().min(8).max(64),
  label: z
    .string()
    .max(400)
    .transform((value) => cleanLine(value, 120)),
  contentType: z.enum(PHOTO_TYPES, {
    error: 'Only JPEG, PNG and WebP photos can be kept. Save it as one of these and choose it again.',
  }),
  sizeBytes: z
    .int()
    .min(1, 'That file is empty. Choose the photo again.')
    .max(MAX_PHOTO_BYTES, 'That photo is larger than 25 MB. Make it smaller, or take it at a lower resolution.'),
  sha256: z.string().regex(/^[A-Za-z0-9+/]{43}=$/, 'The photo could not be measured on this phone. Choose it again.'),
});

export type NewPhoto = z.output<typeof newPhoto>;
