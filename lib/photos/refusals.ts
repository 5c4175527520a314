import { MAX_PHOTO_BYTES, MAX_PIXELS, MAX_SIDE_PX } from './limits';

export const PHOTO_REFUSAL_CODES = [
  'not_a_photo',
  'wrong_type',
  'too_large',
  'too_many_pixels',
  'truncated',
  'altered',
  'too_slow',
  'failed',
] as const;
export type PhotoRefusalCode = (typeof PHOTO_REFUSAL_CODES)[number];

const megabytes = MAX_PHOTO_BYTES / 1024 / 1024;
const megapixels = MAX_PIXELS / 1_000_000;

/** What the person who posted the photo reads: what is wrong with it and what to do. */
export const PHOTO_REFUSALS: Record<PhotoRefusalCode, string> = {
  not_a_photo: 'This file is not a photo we can read. Choose a JPEG, PNG or WebP photo.',
  wrong_type:
    'We take JPEG, PNG and WebP photos, and this file is something else under its name. Save it as JPEG and post that; many phones can be set to take JPEG photos.',
  too_large: `This photo is over ${megabytes} MB. Save a smaller copy and post that.`,
  too_many_pixels: `This photo has more than ${megapixels} megapixels or a side of more than ${MAX_SIDE_PX.toLocaleString('en')} pixels. Save a smaller copy and post that.`,
  truncated: 'Part of this photo is missing. Check that it opens whole on your phone, then post it again.',
  altered: 'This photo changed on its way to us. Post it again.',
  too_slow: 'This photo takes too much work to open. Save a smaller copy as JPEG and post that.',
  failed: 'We could not open this photo. Save a copy of it on your phone, or take it again, and post that.',
};
