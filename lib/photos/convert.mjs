import sharp from 'sharp';

/** @typedef {import('./limits').DecoderLimits} DecoderLimits */
/** @typedef {{ data: Buffer, widthPx: number, heightPx: number }} Upright 8-bit sRGB, three channels, no row padding */

const WEBP = { quality: 80, effort: 2 };
const PAPER = '#ffffff';

/** Complaints libjpeg makes about whole photos: padding before a marker, and scan parameters some phones fill in wrongly. */
const HARMLESS =
  /^VipsJpeg: (Corrupt JPEG data: \d+ extraneous bytes before marker 0x[0-9a-f]+|Invalid SOS parameters)/;

/**
 * @param {unknown} error
 * @returns {boolean} true when every complaint in it is harmless
 */
function isHarmless(error) {
  return error instanceof Error && error.message.split('\n').every((line) => HARMLESS.test(line));
}

/**
 * The one decode: turned upright, converted to sRGB, laid on white and at most `maxWidthPx` wide. JPEG and WebP shrink
 * while they load, so a large photo is never held whole.
 * @param {Buffer} bytes
 * @param {DecoderLimits} limits
 * @param {'warning' | 'error'} failOn
 * @returns {Promise<Upright>}
 */
async function decodeUpright(bytes, limits, failOn) {
  const { data, info } = await sharp(bytes, { failOn, limitInputPixels: limits.maxPixels, pages: 1 })
    .autoOrient()
    .resize({ width: Math.max(...limits.widthsPx), withoutEnlargement: true })
    .flatten({ background: PAPER })
    .toColourspace('srgb')
    .raw({ depth: 'uchar' })
    .toBuffer({ resolveWithObject: true });
  return { data, widthPx: info.width, heightPx: info.height };
}

/** @param {Upright} upright */
function fromRaw({ data, widthPx, heightPx }) {
  return sharp(data, { raw: { width: widthPx, height: heightPx, channels: 3 } });
}

/**
 * @param {number} ownWidthPx
 * @param {readonly number[]} widthsPx ascending
 * @returns {number[]} the widths below the photo's own, then its own
 */
export function variantWidths(ownWidthPx, widthsPx) {
  return [...widthsPx.filter((widthPx) => widthPx < ownWidthPx), ownWidthPx];
}

/**
 * One after the other, so that one photo keeps one core busy and the other is left to the app.
 * @param {Upright} upright
 * @param {readonly number[]} widthsPx
 */
async function encodeVariants(upright, widthsPx) {
  const variants = [];
  for (const width of variantWidths(upright.widthPx, widthsPx)) {
    const { data, info } = await fromRaw(upright).resize({ width }).webp(WEBP).toBuffer({ resolveWithObject: true });
    variants.push({ widthPx: info.width, heightPx: info.height, bytes: data });
  }
  return variants;
}

/**
 * The JPEG for mail: quality, then size, stepped down until it fits. Grain on new wood is what takes the steps.
 * @param {Upright} upright
 * @param {DecoderLimits} limits
 */
async function encodeMailJpeg(upright, { mailWidthPx, maxMailBytes }) {
  for (const scale of [1, 0.75, 0.5, 0.25]) {
    const width = Math.round(mailWidthPx * scale);
    const box = { width, height: 2 * width, fit: /** @type {const} */ ('inside'), withoutEnlargement: true };
    const { data, info } = await fromRaw(upright).resize(box).raw().toBuffer({ resolveWithObject: true });
    const small = { data, widthPx: info.width, heightPx: info.height };
    for (const quality of [80, 70, 60, 50, 40]) {
      const jpeg = await fromRaw(small).jpeg({ quality }).toBuffer();
      if (jpeg.length <= maxMailBytes) return jpeg;
    }
  }
  throw new Error(`no mail picture of at most ${maxMailBytes} bytes`);
}

/**
 * @param {Upright} upright
 * @param {DecoderLimits} limits
 */
async function encodeBlur(upright, { blurSidePx, maxBlurUrlChars }) {
  for (const side of [blurSidePx, blurSidePx / 2, blurSidePx / 4]) {
    const box = { width: side, height: side, fit: /** @type {const} */ ('inside'), withoutEnlargement: true };
    const webp = await fromRaw(upright).resize(box).webp({ quality: 30, effort: 2 }).toBuffer();
    const url = `data:image/webp;base64,${webp.toString('base64')}`;
    if (url.length <= maxBlurUrlChars) return url;
  }
  throw new Error(`no placeholder of at most ${maxBlurUrlChars} characters`);
}

/**
 * Makes everything that is served of one photo. No metadata of the original reaches any of it: the pixels pass through a
 * raw buffer that has none. `widthPx` and `heightPx` are those of the largest variant.
 * @param {Buffer} picture a file that inspectPhoto let through
 * @param {DecoderLimits} limits
 * @throws Error with the decoder's own words when the picture is damaged
 */
export async function convertPhoto(picture, limits) {
  const upright = await decodeUpright(picture, limits, 'warning').catch((error) => {
    if (isHarmless(error)) return decodeUpright(picture, limits, 'error');
    throw error;
  });
  return {
    widthPx: upright.widthPx,
    heightPx: upright.heightPx,
    variants: await encodeVariants(upright, limits.widthsPx),
    mailJpeg: await encodeMailJpeg(upright, limits),
    blurDataUrl: await encodeBlur(upright, limits),
  };
}
