/** What a posted photo may be, and what is made of it. No Node imports: the bench form reads these in the browser. */
export const MAX_PHOTOS_PER_ENTRY = 12;
export const MAX_PHOTO_BYTES = 25 * 1024 * 1024;
export const PHOTO_TYPES = ['image/jpeg', 'image/png', 'image/webp'] as const;
export type PhotoType = (typeof PHOTO_TYPES)[number];

/** Widths a photo is served at. A smaller photo is never enlarged: its own width takes the place of the next one up. */
export const VARIANT_WIDTHS_PX = [320, 640, 1280, 2048] as const;

export const MAX_PIXELS = 50_000_000;
export const MAX_SIDE_PX = 12_000;
/** Progressive JPEG scans; cameras write about ten, and each one costs a pass over the whole picture. */
export const MAX_SCANS = 100;

export const DECODER_TIME_MS = 15_000;
export const DECODER_MEMORY_BYTES = 512 * 1024 * 1024;
export const DECODER_IDLE_MS = 60_000;

/** The photo inside a digest: small enough that twelve of them stay under what mailboxes accept. */
export const MAIL_WIDTH_PX = 560;
export const MAX_MAIL_BYTES = 60_000;

export const BLUR_SIDE_PX = 16;
export const MAX_BLUR_URL_CHARS = 399;

/** What the decoder is told with every job; it reads no configuration of its own. */
export const DECODER_LIMITS = {
  maxPixels: MAX_PIXELS,
  maxSidePx: MAX_SIDE_PX,
  maxScans: MAX_SCANS,
  widthsPx: VARIANT_WIDTHS_PX,
  mailWidthPx: MAIL_WIDTH_PX,
  maxMailBytes: MAX_MAIL_BYTES,
  blurSidePx: BLUR_SIDE_PX,
  maxBlurUrlChars: MAX_BLUR_URL_CHARS,
};
export type DecoderLimits = typeof DECODER_LIMITS;
