import { MAX_PHOTO_BYTES, MAX_PHOTOS_PER_ENTRY, type PhotoType } from './limits';

/** How many leading bytes of a file `photoTypeOf` and `choiceRefusal` need. */
export const HEAD_BYTES = 32;

const MEGABYTES = MAX_PHOTO_BYTES / 1024 / 1024;
const NOT_A_PHOTO = 'This is not a photo we can keep. Choose a JPEG, PNG or WebP photo.';
const heicBrands = ['heic', 'heix', 'heim', 'heis', 'hevc', 'hevx', 'mif1', 'msf1'];

/** What the first bytes say a file is; its name and the type a phone gives it are not asked. */
export function photoTypeOf(head: Uint8Array): PhotoType | null {
  if (head[0] === 0xff && head[1] === 0xd8 && head[2] === 0xff) return 'image/jpeg';
  if (latin(head, 0, 8) === '\x89PNG\r\n\x1a\n') return 'image/png';
  if (latin(head, 0, 4) === 'RIFF' && latin(head, 8, 12) === 'WEBP') return 'image/webp';
  return null;
}

/** Why a chosen file is not even sent, as a sentence; null when it may go up. `notAPhoto` is said of any other kind of file. */
export function choiceRefusal(head: Uint8Array, sizeBytes: number, notAPhoto = NOT_A_PHOTO): string | null {
  if (sizeBytes === 0) return 'This file is empty. Choose the photo again.';
  if (isHeic(head)) return 'This phone saves HEIC; set the camera to Most compatible or choose a JPEG.';
  if (!photoTypeOf(head)) return notAPhoto;
  if (sizeBytes > MAX_PHOTO_BYTES) return `This photo is over ${MEGABYTES} MB. Save a smaller copy and choose that.`;
  return null;
}

/** What is said when more photos are chosen than the entry has room for; null when all fit. */
export function roomRefusal(keptCount: number, chosenCount: number): string | null {
  const overCount = keptCount + chosenCount - MAX_PHOTOS_PER_ENTRY;
  if (overCount <= 0) return null;
  const left =
    overCount === 1 ? 'The last one was left out; post it' : `The last ${overCount} were left out; post them`;
  return `An entry holds at most ${MAX_PHOTOS_PER_ENTRY} photos. ${left} in a second entry.`;
}

function isHeic(head: Uint8Array): boolean {
  return latin(head, 4, 8) === 'ftyp' && heicBrands.includes(latin(head, 8, 12));
}

const latin = (bytes: Uint8Array, from: number, to: number) => String.fromCharCode(...bytes.subarray(from, to));
